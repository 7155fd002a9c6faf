import { Plus, X } from 'lucide-react';
import { useId, useState, type KeyboardEvent } from 'react';
import { Button } from '#src/ui/button.tsx';
import { TextField } from '#src/ui/text-field.tsx';

type SkillsFieldProps = {
  value: readonly string[];
  onChange: (skills: string[]) => void;
  /** Skills in use, offered to press. */
  known: readonly string[];
  error?: string | undefined;
};

/** Words, each a button that takes it off; new ones by Enter or comma, known ones by a press. */
export function SkillsField({ value, onChange, known, error }: SkillsFieldProps) {
  const [typed, setTyped] = useState('');
  const listId = useId();
  const offers = known.filter((skill) => !value.includes(skill));
  const add = (text: string) => {
    const skills = text
      .toLowerCase()
      .split(/[,;|]/)
      .map((word) => word.trim());
    const fresh = skills.filter((word) => word !== '');
    if (fresh.length > 0) onChange([...new Set([...value, ...fresh])]);
    setTyped('');
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if ((event.key === 'Enter' || event.key === ',') && typed.trim() !== '') {
      event.preventDefault();
      add(typed);
    } else if (event.key === 'Backspace' && typed === '' && value.length > 0) onChange(value.slice(0, -1));
  };
  return (
    <div className="flex flex-col gap-2">
      <TextField
        label="Skills"
        hint="What process sheets ask for. Enter adds a word, Backspace takes the last one off."
        error={error}
        list={listId}
        autoComplete="off"
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        onKeyDown={onKeyDown}
        onBlur={() => add(typed)}
      />
      <datalist id={listId}>
        {offers.map((skill) => (
          <option key={skill} value={skill} />
        ))}
      </datalist>
      <ul aria-label="Skills chosen" className="flex flex-wrap gap-1.5 empty:hidden">
        {value.map((skill) => (
          <li key={skill}>
            <Button
              size="small"
              aria-label={`Take off ${skill}`}
              onClick={() => onChange(value.filter((one) => one !== skill))}
            >
              {skill}
              <X size={14} aria-hidden="true" />
            </Button>
          </li>
        ))}
      </ul>
      {offers.length > 0 && (
        <div role="group" aria-label="Skills in use" className="flex flex-wrap gap-1.5">
          {offers.slice(0, 12).map((skill) => (
            <Button key={skill} size="small" look="quiet" aria-label={`Add ${skill}`} onClick={() => add(skill)}>
              <Plus size={14} aria-hidden="true" />
              {skill}
            </Button>
          ))}
        </div>
      )}
    </div>
  );
}
