import { minutesFromSheet } from '#chemistry/sheets/minutes-from-sheet.ts';
import type { PhaseKind } from '#contracts/common.ts';
import type { Coating, PhaseSource } from '#contracts/coatings.ts';
import type { Phase } from '#contracts/sheets.ts';
import { useFormats } from '#src/lib/session.ts';
import { Select } from '#src/ui/select.tsx';
import { withoutSource } from '../model/phases.ts';

/** Lines of a data sheet that a phase of each kind can be taken from. */
const linesOf: Partial<Record<PhaseKind, readonly PhaseSource[]>> = {
  spray: ['coat'],
  flash: ['flash-between', 'flash-next', 'flash-heat', 'air'],
  bake: ['bake', 'lamp-short', 'lamp-medium'],
};
const lineWords: Record<PhaseSource, string> = {
  coat: 'a coat of the sheet',
  'flash-between': 'flash between coats',
  'flash-next': 'flash before next',
  'flash-heat': 'flash before heat',
  bake: 'bake',
  'lamp-short': 'short-wave lamp',
  'lamp-medium': 'medium-wave lamp',
  air: 'air dry',
};

type SourceSelectProps = { phase: Phase; name: string; coating: Coating | null; onChange: (phase: Phase) => void };

/** Which line of the data sheet the minutes are taken from; taking one sets them. */
export function SourceSelect({ phase, name, coating, onChange }: SourceSelectProps) {
  const { duration } = useFormats();
  const lines = (linesOf[phase.kind] ?? []).filter(
    (source) =>
      source === 'coat' || source === phase.source || (coating && minutesFromSheet(source, coating.sheet) !== null),
  );
  if (lines.length === 0 || (coating === null && phase.source === undefined)) return <span className="max-sm:hidden" />;
  const says = (source: PhaseSource): number | null => coating && minutesFromSheet(source, coating.sheet);
  return (
    <Select
      label={`Where ${name} comes from`}
      hideLabel
      value={phase.source ?? ''}
      onChange={({ target }) => {
        const source = target.value as PhaseSource | '';
        if (source === '') onChange(withoutSource(phase));
        else onChange({ ...phase, source, minutes: says(source) ?? phase.minutes });
      }}
    >
      <option value="">the shop’s own</option>
      {lines.map((source) => {
        const minutes = says(source);
        return (
          <option key={source} value={source}>
            {minutes === null ? lineWords[source] : `${lineWords[source]}, ${duration(minutes)}`}
          </option>
        );
      })}
    </Select>
  );
}
