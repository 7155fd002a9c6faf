import { useId, useMemo } from 'react';
import { boxClasses } from '#src/ui/box-classes.ts';
import { Field } from '#src/ui/field.tsx';

type ZoneFieldProps = { value: string; error?: string | undefined; onChange: (zone: string) => void };

/** The browser knows the list; the server decides. Typing a city finds its zone. */
const zones = (): string[] => ['UTC', ...Intl.supportedValuesOf('timeZone').filter((zone) => zone !== 'UTC')];

export function ZoneField({ value, error, onChange }: ZoneFieldProps) {
  const listId = useId();
  const names = useMemo(() => zones(), []);
  const clock = clockIn(value);
  return (
    <Field
      label="Time zone"
      hint={
        clock === null
          ? 'Type a city to find it.'
          : `Its clock shows ${clock} now. Wall times of hours, shifts and upkeep are read in it.`
      }
      error={error}
    >
      {(ids) => (
        <>
          <input
            {...ids}
            type="text"
            list={listId}
            autoComplete="off"
            spellCheck={false}
            className={boxClasses}
            value={value}
            onChange={(event) => onChange(event.target.value)}
          />
          <datalist id={listId}>
            {names.map((name) => (
              <option key={name} value={name}>
                {name.replaceAll('_', ' ')}
              </option>
            ))}
          </datalist>
        </>
      )}
    </Field>
  );
}

/** Null where it is no zone. */
function clockIn(zone: string): string | null {
  try {
    return new Intl.DateTimeFormat('en-GB', { timeZone: zone, hour: 'numeric', minute: '2-digit' }).format(new Date());
  } catch {
    return null;
  }
}
