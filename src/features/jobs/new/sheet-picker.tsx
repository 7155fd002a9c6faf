import { Check } from 'lucide-react';
import { useState } from 'react';
import type { Sheet } from '#contracts/sheets.ts';
import { optionsOn } from '#server/sheets/options.ts';
import { cx } from '#src/lib/cx.ts';
import { useFormats } from '#src/lib/session.ts';
import { useIsNarrow } from '#src/lib/use-media.ts';
import { Button } from '#src/ui/button.tsx';
import { leastMinutes, stagesLeft } from '../model/sheet-stages.ts';
import { StageChain } from './stage-chain.tsx';

type SheetPickerProps = {
  sheets: readonly Sheet[];
  value: string;
  onPick: (sheet: Sheet) => void;
  error: string | undefined;
};

/** Process sheets as cards: what each is for, and its chain as a drawing. */
export function SheetPicker({ sheets, value, onPick, error }: SheetPickerProps) {
  const isNarrow = useIsNarrow();
  const [all, setAll] = useState(false);
  const picked = sheets.filter(({ id }) => id === value);
  // On a phone the cards make way for what is to be filled in next.
  const shown = isNarrow && !all && picked.length > 0 ? picked : sheets;
  return (
    <fieldset className="min-w-0" aria-describedby={error ? 'sheet-error' : undefined}>
      <legend className="mb-2 text-base font-bold">Process sheet</legend>
      <div className="grid gap-2.5 sm:grid-cols-2">
        {shown.map((sheet) => (
          <SheetCard
            key={sheet.id}
            sheet={sheet}
            picked={sheet.id === value}
            onPick={() => {
              setAll(false);
              onPick(sheet);
            }}
          />
        ))}
      </div>
      {shown.length < sheets.length && (
        <Button size="small" look="quiet" className="mt-1.5" onClick={() => setAll(true)}>
          Another process sheet
        </Button>
      )}
      {error && (
        <p id="sheet-error" className="mt-1.5 text-xs font-semibold text-crimson">
          {error}
        </p>
      )}
    </fieldset>
  );
}

function SheetCard({ sheet, picked, onPick }: { sheet: Sheet; picked: boolean; onPick: () => void }) {
  const { duration } = useFormats();
  const stages = stagesLeft(sheet.body, optionsOn(sheet.body));
  return (
    <label
      className={cx(
        'card relative flex min-w-0 flex-col gap-2 p-3.5 hover:border-edge',
        'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-petrol',
        picked && 'border-petrol! bg-petrol-soft shadow-[inset_0_0_0_1px_var(--petrol)]',
      )}
    >
      <input type="radio" name="sheet" className="sr-only" checked={picked} onChange={onPick} />
      <span className="flex items-start justify-between gap-2">
        <span className="font-bold">{sheet.name}</span>
        {picked && <Check size={18} className="shrink-0 text-petrol" aria-hidden="true" />}
      </span>
      <span className="text-[0.8125rem] text-muted">{sheet.body.summary}</span>
      <span className="mt-auto flex flex-col gap-1.5 pt-1">
        <StageChain stages={stages} />
        <span className="figures text-xs text-muted">
          {stages.length} stages, at least {duration(leastMinutes(stages))}
        </span>
      </span>
    </label>
  );
}
