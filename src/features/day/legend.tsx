import { phaseWords } from '#src/lib/phase-words.ts';
import { Caution } from '#src/ui/caution.tsx';

const kinds = ['work', 'setup', 'spray', 'flash', 'purge', 'bake', 'cool', 'held'] as const;

/** What the patterns and lines mean. */
export function Legend() {
  return (
    <ul className="flex flex-wrap gap-x-4 gap-y-1 text-xs text-muted" aria-label="What the patterns mean">
      {kinds.map((kind) => (
        <li key={kind} className="flex items-center gap-1.5">
          <i className={`phase-${kind} h-3 w-6 rounded-sm`} aria-hidden="true" />
          {phaseWords[kind]}
        </li>
      ))}
      <li className="flex items-center gap-1.5">
        <i className="relative h-3 w-8" aria-hidden="true">
          <i className="absolute inset-x-0 top-[5px] h-0.5 bg-petrol" />
          <i className="absolute top-0 left-2 h-3 w-0.5 bg-ink" />
        </i>
        window, tick where it starts
      </li>
    </ul>
  );
}

export const DayCaution = () => (
  <Caution quiet>
    Times, heat and lamps here are a plan, not a release: the maker’s data sheet, local fire and environmental codes and
    the licensed people responsible come first. Isocyanate coatings need supplied air. Nobody enters during purge or
    bake. Vehicles with high-voltage batteries and plastic parts have lower heat limits.
  </Caution>
);
