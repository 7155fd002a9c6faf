import type { SheetOption } from '#contracts/sheets.ts';
import { timesChosen } from '#server/sheets/options.ts';
import { Checkbox } from '#src/ui/checkbox.tsx';
import { Select } from '#src/ui/select.tsx';

type OptionTogglesProps = {
  options: readonly SheetOption[];
  chosen: readonly string[];
  onChange: (chosen: string[]) => void;
};

/** The options as a job would choose them; what can be chosen several times is counted. */
export function OptionToggles({ options, chosen, onChange }: OptionTogglesProps) {
  if (options.length === 0) return null;
  const choose = (key: string, times: number): void =>
    onChange([...chosen.filter((one) => one !== key), ...Array.from({ length: times }, () => key)]);
  return (
    <div role="group" aria-label="With the options" className="flex flex-wrap items-center gap-x-5 gap-y-1">
      {options.map(({ key, label, most = 1 }) =>
        most === 1 ? (
          <Checkbox
            key={key}
            label={label}
            checked={chosen.includes(key)}
            onChange={({ target }) => choose(key, target.checked ? 1 : 0)}
          />
        ) : (
          <div key={key} className="flex items-center gap-2">
            <span aria-hidden="true">{label}</span>
            <Select
              label={label}
              hideLabel
              className="w-24"
              value={String(timesChosen(chosen, key))}
              onChange={({ target }) => choose(key, Number(target.value))}
            >
              {Array.from({ length: most + 1 }, (_, n) => (
                <option key={n} value={n}>
                  {n === 0 ? 'none' : n}
                </option>
              ))}
            </Select>
          </div>
        ),
      )}
    </div>
  );
}
