import { Droplets } from 'lucide-react';
import type { SprayAir } from '#contracts/bench.ts';
import { cx } from '#src/lib/cx.ts';
import { useFormats } from '#src/lib/session.ts';
import { airStanding } from './model/air-words.ts';

const tones = { room: 'text-petrol', closing: 'text-amber', late: 'text-crimson' };

/** Before something is sprayed: what the dew-point gate says. */
export function AirNote({ air }: { air: SprayAir | null }) {
  const said = airStanding(air, useFormats());
  if (!said) return null;
  return (
    <p className={cx('figures flex items-start gap-2 text-base font-semibold', tones[said.tone])}>
      <Droplets size={20} aria-hidden="true" className="mt-0.5 shrink-0" />
      <span>{said.words}</span>
    </p>
  );
}
