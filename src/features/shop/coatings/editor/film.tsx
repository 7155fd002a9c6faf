import type { CoatingSheet } from '#contracts/coatings.ts';
import { useFormats } from '#src/lib/session.ts';
import { PhaseBar, PhaseLegend } from '#src/ui/phase-bar.tsx';
import { doubtsOf } from '../model/doubt-words.ts';
import { filmOf } from '../model/film-pieces.ts';

/** What comes of the sheet, drawn as the film goes on. */
export function Film({ sheet }: { sheet: CoatingSheet | null }) {
  const formats = useFormats();
  const film = sheet && filmOf(sheet, formats);
  return (
    <section aria-label="What comes of it" className="card flex flex-col gap-2.5 p-4">
      <h2 className="text-base font-bold">What comes of it</h2>
      {film ? (
        <>
          <PhaseBar pieces={film.pieces} />
          <p className="text-[0.8125rem]">{film.words} Coats are drawn 6 min long.</p>
          <PhaseLegend kinds={[...new Set(film.pieces.map(({ kind }) => kind))]} />
        </>
      ) : (
        <p className="text-muted">The drawing comes back once every figure makes sense.</p>
      )}
    </section>
  );
}

/** Looks while one types: not wrong, but worth a second look at the maker's sheet. */
export function Doubts({ sheet }: { sheet: CoatingSheet | null }) {
  const formats = useFormats();
  const doubts = sheet ? doubtsOf(sheet, formats) : [];
  return (
    <div role="status" aria-label="Worth a second look">
      {doubts.length > 0 && (
        <div className="flex flex-col gap-1.5 rounded border border-amber bg-amber-soft px-3.5 py-2.5">
          <p className="font-semibold">Worth a second look</p>
          <ul className="flex list-disc flex-col gap-1 pl-4.5 text-[0.8125rem]">
            {doubts.map((doubt) => (
              <li key={doubt}>{doubt}</li>
            ))}
          </ul>
        </div>
      )}
    </div>
  );
}
