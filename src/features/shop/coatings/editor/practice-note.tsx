import { coatingKindWords } from '#src/lib/coating-words.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { filledIn, offersFor } from '../model/practice.ts';
import type { SheetForm } from '../model/sheet-form.ts';
import type { FormParts } from './form-fields.tsx';

/** What is usual for this kind, for a shop that has the maker's sheet not at hand. */
export function PracticeNote({ form, change, untouched }: FormParts & { untouched: SheetForm }) {
  const { unit } = useFormats();
  const offers = offersFor(form.kind, unit);
  if (offers.length === 0) return null;
  const fill = filledIn(form, untouched, offers);
  return (
    <section aria-label="Common practice" className="flex flex-col gap-2 rounded border border-dashed border-edge p-4">
      <p className="font-semibold">{coatingKindWords[form.kind]}: common practice, check against the maker’s sheet</p>
      <ul className="figures flex flex-wrap gap-x-4 gap-y-0.5 text-[0.8125rem] text-muted">
        {offers.map(({ label, said }) => (
          <li key={label}>
            {label}: {said}
          </li>
        ))}
      </ul>
      <Button
        size="small"
        className="self-start"
        disabled={Object.keys(fill).length === 0}
        onClick={() => change(fill)}
      >
        Fill what is empty with these
      </Button>
    </section>
  );
}
