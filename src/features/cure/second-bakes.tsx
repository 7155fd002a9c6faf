import { useFormats } from '#src/lib/session.ts';
import { useWidth } from './drawings/use-width.ts';
import type { BakeSum } from './model/bakes.ts';
import { energyWords } from './model/energy-words.ts';
import { degrees, findingWords } from './model/finding-words.ts';
import { plainNumber } from './model/typed.ts';
import { Facts, Headline, Source, Warnings } from './sections.tsx';

export function SecondBakes({ sum }: { sum: BakeSum }) {
  const { unit, duration } = useFormats();
  const { kinetics, energyFrom } = sum.cure;
  const need = kinetics.referenceMinutes;
  const reference = degrees(kinetics.referenceCelsius, unit);
  const minutes = (value: number) => `${plainNumber(value, 1)} min`;
  return (
    <>
      <Headline figure={sum.restMinutes === 0 ? 'Cured' : duration(sum.restMinutes)}>
        {sum.restMinutes === 0
          ? 'by the sheet; nothing is left to bake'
          : `still to bake with the metal at ${degrees(sum.restCelsius, unit)}`}
      </Headline>
      <Stack worth={sum.worth} need={need} />
      <Facts
        rows={[
          ...sum.worth.map((worth, i) => [`Bake ${i + 1} was worth`, minutes(worth)] as const),
          [`Done, as minutes at ${reference}`, minutes(sum.done)],
          ['The sheet asks for', minutes(need)],
        ]}
      />
      <Warnings words={sum.findings.map((finding) => findingWords(finding, unit))} />
      <Source>
        bakes add up as minutes at the sheet&rsquo;s hottest line, {reference}; sanding between them takes film away,
        never cure. Heat-up is not in these minutes. Ea{' '}
        {energyWords({ kilojoulesPerMole: kinetics.kilojoulesPerMole, from: energyFrom })}.
      </Source>
    </>
  );
}

const tones = ['fill-ember', 'fill-petrol', 'fill-amber', 'fill-moss'];

/** The bakes end to end against the mark of what the sheet asks. */
function Stack({ worth, need }: { worth: readonly number[]; need: number }) {
  const [ref, width] = useWidth();
  const total = worth.reduce((sum, one) => sum + one, 0);
  const toX = (minutes: number) => 2 + (minutes / Math.max(need, total)) * (width - 4);
  const starts = worth.map((_, i) => worth.slice(0, i).reduce((sum, one) => sum + one, 0));
  return (
    <div ref={ref} className="min-w-0 overflow-hidden">
      <svg
        role="img"
        aria-label={`${plainNumber(total, 1)} of ${plainNumber(need, 1)} min`}
        width={width}
        height={34}
        className="block"
      >
        <rect x={2} y={6} height={20} width={toX(need) - 2} rx={3} className="fill-paper stroke-edge" />
        {worth.map((one, i) => (
          <rect
            key={i}
            x={toX(starts[i] ?? 0)}
            y={6}
            height={20}
            width={Math.max(1, toX((starts[i] ?? 0) + one) - toX(starts[i] ?? 0))}
            className={`${tones[i % tones.length] ?? ''} stroke-surface`}
          />
        ))}
        <line x1={toX(need)} x2={toX(need)} y1={1} y2={32} className="stroke-ink" strokeWidth={2} />
      </svg>
    </div>
  );
}
