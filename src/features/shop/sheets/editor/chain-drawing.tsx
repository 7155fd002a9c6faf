import { Anchor } from 'lucide-react';
import { useState } from 'react';
import type { SheetBody } from '#contracts/sheets.ts';
import { optionsOn } from '#server/sheets/options.ts';
import { cx } from '#src/lib/cx.ts';
import { phasesInWords, type PieceKind } from '#src/lib/phase-words.ts';
import { useFormats } from '#src/lib/session.ts';
import { PhaseBar, PhaseLegend } from '#src/ui/phase-bar.tsx';
import { chainOf, leastMinutes, widthOf, type ChainLink } from '../model/chain.ts';
import { useEditor } from './editor-context.ts';
import { GapLine } from './gap-line.tsx';
import { OptionToggles } from './option-toggles.tsx';

/** The whole chain by its quickest ways, with the windows between the stages; options show their variant. */
export function ChainDrawing({ chosen }: { chosen: string | null }) {
  const { body } = useEditor();
  const { duration } = useFormats();
  const [picked, pick] = useState<string[] | null>(null);
  const known = picked?.filter((key) => body.options.some((option) => option.key === key));
  const options = known ?? optionsOn(body);
  const chain = chainOf(body, options);
  const kinds = [...new Set(chain.flatMap(({ phases }) => phases.map(({ kind }): PieceKind => kind)))];
  return (
    <section aria-label="The chain" className="card flex min-w-0 flex-col gap-2.5 p-4">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2>The chain</h2>
        <p className="figures text-muted" role="status">
          {chain.length === 1 ? '1 stage' : `${chain.length} stages`}, at least {duration(leastMinutes(chain))} by the
          quickest ways
        </p>
      </div>
      <OptionToggles options={body.options} chosen={options} onChange={pick} />
      {chain.length === 0 ? (
        <p className="rounded border border-dashed border-edge p-4 text-muted">
          Add the first stage, and the chain is drawn here with its times and windows.
        </p>
      ) : (
        <>
          <div
            role="region"
            aria-label="Drawing of the chain"
            tabIndex={0}
            className="-mx-4 overflow-x-auto px-4 pb-1.5"
          >
            <ol className="flex w-max items-start">
              {chain.map((link, i) => (
                <Link key={link.key} link={link} at={i} body={body} chosen={link.key === chosen} />
              ))}
            </ol>
          </div>
          <PhaseLegend kinds={kinds} />
        </>
      )}
    </section>
  );
}

function Link({ link, at, body, chosen }: { link: ChainLink; at: number; body: SheetBody; chosen: boolean }) {
  const { open } = useEditor();
  const { duration } = useFormats();
  const { key, title, phases, minutes, gap, way, ways } = link;
  const number = body.stages.findIndex((stage) => stage.key === key) + 1;
  return (
    <li className="flex items-start">
      {gap && <Gap gap={gap} />}
      <button
        type="button"
        onClick={() => open(key)}
        aria-current={chosen ? 'true' : undefined}
        aria-label={`${number} ${title}: ${phasesInWords(phases, duration)}`}
        style={{ width: Math.max(128, widthOf(minutes)) }}
        className={cx(
          'flex flex-col gap-1 rounded px-1.5 py-1.5 text-left hover:bg-paper',
          chosen && 'bg-petrol-soft shadow-[inset_0_-3px_0_var(--petrol)]',
        )}
      >
        <span className="truncate text-[0.8125rem] font-semibold">
          <span className="figures font-normal text-muted">{at + 1}</span> {title}
        </span>
        <PhaseBar pieces={phases.map((phase) => ({ kind: phase.kind, size: Math.max(1, widthOf(phase.minutes)) }))} />
        <span className="figures truncate text-xs text-muted">
          {duration(minutes)}
          {ways > 1 ? ` · ${way}, 1 of ${ways}` : ''}
        </span>
      </button>
    </li>
  );
}

/** What lies between two stages: from the earliest to the latest start. */
function Gap({ gap: { min, max, stay } }: { gap: NonNullable<ChainLink['gap']> }) {
  const { duration } = useFormats();
  const words =
    min === 0 && max === null
      ? 'any time'
      : max === null
        ? `from ${duration(min)}`
        : `${duration(min)} to ${duration(max)}`;
  return (
    <span className="flex w-24 shrink-0 flex-col items-center gap-1 px-1 pt-1.5">
      <span className="flex h-[1.1rem] items-center text-muted">
        {stay && <Anchor size={13} role="img" aria-label="stays where it is" />}
      </span>
      <span className="flex h-6 w-full items-center">
        <GapLine gap={{ min, max }} className="w-full" />
      </span>
      <span className="figures text-center text-xs leading-tight text-muted">{words}</span>
    </span>
  );
}
