import { Select } from '#src/ui/select.tsx';
import { useEditor } from './editor-context.ts';

type Condition = { option?: string | null | undefined; unlessOption?: string | undefined };
type ConditionSelectProps = {
  label: string;
  value: Condition;
  onChange: (value: { option: string | null; unlessOption: string | undefined }) => void;
};

/** Whether something is there always, only with an option, or only without it. Nothing to choose where a sheet has no options. */
export function ConditionSelect({ label, value, onChange }: ConditionSelectProps) {
  const { body } = useEditor();
  const { option, unlessOption } = value;
  if (body.options.length === 0 && option == null && unlessOption === undefined) return null;
  const both = option != null && unlessOption !== undefined;
  const chosen = both
    ? 'both'
    : option != null
      ? `with ${option}`
      : unlessOption === undefined
        ? ''
        : `without ${unlessOption}`;
  const known = body.options.map(({ key }) => key);
  const lost = [option, unlessOption].filter((key) => key != null).filter((key) => !known.includes(key));
  return (
    <Select
      label={label}
      value={chosen}
      onChange={({ target }) => {
        if (target.value === 'both') return;
        const [, word, key] = /^(with|without) (.+)$/.exec(target.value) ?? [];
        onChange({
          option: word === 'with' && key !== undefined ? key : null,
          unlessOption: word === 'without' ? key : undefined,
        });
      }}
    >
      <option value="">Always</option>
      {both && <option value="both">{`With “${option}” and without “${unlessOption}”`}</option>}
      {[...body.options, ...lost.map((key) => ({ key, label: `${key} (not an option)` }))].flatMap((one) => [
        <option key={`with ${one.key}`} value={`with ${one.key}`}>{`Only with “${one.label}”`}</option>,
        <option key={`without ${one.key}`} value={`without ${one.key}`}>{`Only without “${one.label}”`}</option>,
      ])}
    </Select>
  );
}
