import { gapFromSheet } from '#chemistry/sheets/gap-from-sheet.ts';
import type { Way } from '#contracts/sheets.ts';
import { useFormats } from '#src/lib/session.ts';
import { Select } from '#src/ui/select.tsx';
import type { Below } from '../model/way-templates.ts';
import { MinutesField } from './figure-field.tsx';
import { GapLine } from './gap-line.tsx';

type Gap = Way['gap'];
type Source = NonNullable<Gap['source']>;
const sources: Record<Source, string> = {
  next: 'Earliest: flash before the next product',
  recoat: 'Whole recoat window',
  heat: 'Earliest: flash before heat',
};

type GapFieldsProps = { gap: Gap; below: Below; onChange: (gap: Gap, field: string) => void };

/** When the stage may begin after the one before it, and for how long the place is held meanwhile. */
export function GapFields({ gap, below, onChange }: GapFieldsProps) {
  const { duration } = useFormats();
  const { coating } = below;
  const set = (part: Partial<Gap>, field: string) => onChange({ ...gap, ...part }, `gap-${field}`);
  const setSource = (value: string) => {
    const { source: _, ...own } = gap;
    if (value === '') onChange(own, 'gap-source');
    else {
      const sourced = { ...own, source: value as Source };
      onChange(coating ? gapFromSheet(sourced, coating.sheet) : sourced, 'gap-source');
    }
  };
  return (
    <fieldset className="flex min-w-0 flex-col gap-2">
      <legend className="mb-2 font-bold">Window after the stage before</legend>
      <div className="grid grid-cols-2 items-start gap-3 sm:grid-cols-4">
        <MinutesField
          label="Earliest"
          value={gap.min}
          onChange={(min) => set({ min: min ?? 0, settle: gap.settle === gap.min ? (min ?? 0) : gap.settle }, 'min')}
        />
        <MinutesField
          label="Latest"
          nullable
          placeholder="No limit"
          value={gap.max}
          onChange={(max) => set({ max }, 'max')}
        />
        <MinutesField
          label="Place held for"
          value={gap.settle}
          onChange={(settle) => set({ settle: settle ?? 0 }, 'settle')}
        />
        <Select label="Taken from" value={gap.source ?? ''} onChange={({ target }) => setSource(target.value)}>
          <option value="">The shop’s own</option>
          {(Object.keys(sources) as Source[]).map((source) => (
            <option key={source} value={source} disabled={coating === null}>
              {sources[source]}
            </option>
          ))}
        </Select>
      </div>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1 text-xs text-muted">
        <GapLine gap={gap} className="w-40" />
        <span>
          {gap.max === null ? `From ${duration(gap.min)} on` : `Between ${duration(gap.min)} and ${duration(gap.max)}`}{' '}
          after it ends
          {coating && below.wet ? `, on ${coating.name}` : ''}
        </span>
      </div>
    </fieldset>
  );
}
