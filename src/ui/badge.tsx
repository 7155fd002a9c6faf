import type { ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

export type Tone = 'plain' | 'moss' | 'amber' | 'crimson' | 'petrol' | 'ember';

const tones: Record<Tone, string> = {
  plain: 'bg-paper text-muted border-line',
  moss: 'bg-moss-soft text-moss border-[color-mix(in_srgb,var(--moss)_35%,transparent)]',
  amber: 'bg-amber-soft text-amber border-[color-mix(in_srgb,var(--amber)_40%,transparent)]',
  crimson: 'bg-crimson-soft text-crimson border-[color-mix(in_srgb,var(--crimson)_40%,transparent)]',
  petrol: 'bg-petrol-soft text-petrol border-[color-mix(in_srgb,var(--petrol)_35%,transparent)]',
  ember: 'bg-ember-soft text-ember border-[color-mix(in_srgb,var(--ember)_40%,transparent)]',
};

/** A word that stands out. Never colour alone: the word says it. `solid` for what must not be overlooked. */
export function Badge({ tone = 'plain', solid, children }: { tone?: Tone; solid?: boolean; children: ReactNode }) {
  return (
    <span
      className={cx(
        'inline-flex items-center gap-1 rounded-sm border px-1.5 text-xs leading-5 font-semibold whitespace-nowrap',
        solid && tone === 'crimson' ? 'border-crimson bg-crimson text-on-crimson' : tones[tone],
      )}
    >
      {children}
    </span>
  );
}
