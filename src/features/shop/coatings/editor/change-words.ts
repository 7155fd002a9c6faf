import type { TouchedByCoating } from '#contracts/retiming.ts';
import { useFormats } from '#src/lib/session.ts';

export type TouchedStage = TouchedByCoating['sheets'][number]['stages'][number];
type Way = TouchedStage['ways'][number];

/** Each change of each way in a few words: `Bake clear, Booth bake: 40 to 50 min`. */
export function useChangeWords(): (stages: readonly TouchedStage[]) => { text: string; booked: boolean }[] {
  const { duration, temperature } = useFormats();
  const wordsOf = ({ minutes, earliest, latest, bakeCelsius }: Way): string[] =>
    [
      minutes && `${duration(minutes.from)} → ${duration(minutes.to)}`,
      earliest && `earliest after ${duration(earliest.from)} → ${duration(earliest.to)}`,
      latest &&
        `latest after ${latest.from === null ? 'any time' : duration(latest.from)} → ${latest.to === null ? 'any time' : duration(latest.to)}`,
      bakeCelsius && `${temperature(bakeCelsius.from)} → ${temperature(bakeCelsius.to)}`,
    ].filter((word) => word !== null);
  return (stages) =>
    stages.flatMap(({ title, booked, ways }) =>
      ways.flatMap((way) => {
        const words = wordsOf(way);
        return words.length === 0 ? [] : [{ text: `${title}, ${way.label}: ${words.join('; ')}`, booked }];
      }),
    );
}
