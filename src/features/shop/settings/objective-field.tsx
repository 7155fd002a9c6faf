import { useId } from 'react';
import { cx } from '#src/lib/cx.ts';
import { FieldNotes } from '#src/ui/field-notes.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { objectiveKeys, presetOf, presets, weightsOf, weightWords, type ShopForm } from './model/shop-form.ts';

type ObjectiveFieldProps = {
  weights: ShopForm['weights'];
  error?: string | undefined;
  onChange: (weights: ShopForm['weights']) => void;
};

/** What a plan tries to do: one of three in words, or figures of one's own. */
export function ObjectiveField({ weights, error, onChange }: ObjectiveFieldProps) {
  const name = useId();
  const chosen = presetOf(weights);
  return (
    <div className="flex flex-col gap-3">
      <div role="radiogroup" aria-label="What a plan tries to do" className="grid gap-2 md:grid-cols-3">
        {presets.map(({ key, title, about }) => (
          <label
            key={key}
            className={cx(
              'flex flex-col gap-1 rounded border px-3.5 py-2.5',
              'has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-petrol',
              chosen === key ? 'border-ink bg-paper' : 'border-edge',
            )}
          >
            <span className="flex items-center gap-2 font-semibold">
              <input
                type="radio"
                name={name}
                className="size-4 accent-petrol"
                checked={chosen === key}
                onChange={() => onChange(weightsOf(key))}
              />
              {title}
            </span>
            <span className="text-xs text-muted">{about}</span>
          </label>
        ))}
      </div>
      <details open={chosen === null}>
        <summary className="cursor-pointer font-semibold">
          {chosen === null ? 'Figures of your own' : 'In figures'}
        </summary>
        <div className="grid gap-3 pt-3 sm:grid-cols-3">
          {objectiveKeys.map((key) => (
            <TextField
              key={key}
              label={weightWords[key].label}
              hint={weightWords[key].hint}
              inputMode="decimal"
              autoComplete="off"
              value={weights[key]}
              onChange={(event) => onChange({ ...weights, [key]: event.target.value })}
            />
          ))}
        </div>
        <p className="pt-2 text-xs text-muted">
          What each costs. A plan is the better the less it costs in all; the figures are our own and there to be tried.
        </p>
      </details>
      <FieldNotes id={`${name}-note`} error={error} />
    </div>
  );
}
