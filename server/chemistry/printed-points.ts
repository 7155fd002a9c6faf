import { positive, QuantityError, temperature } from '#chemistry/quantity.ts';

/** One line of a data sheet: so many minutes at that temperature. */
export type PrintedPoint = { celsius: number; minutes: number };

/** At least one point, coldest first, no temperature twice, hotter never slower. */
export type PrintedPoints = readonly [PrintedPoint, ...PrintedPoint[]];

/**
 * Puts a data sheet's points in order, coldest first.
 *
 * @throws QuantityError where there is no point, a time is not positive, a temperature comes twice, or a hotter line takes
 * longer than a colder one: then a line was mistyped, and no formula should smooth that over.
 */
export function orderPoints(points: readonly PrintedPoint[]): PrintedPoints {
  const [coldest, ...hotter] = points.toSorted((a, b) => a.celsius - b.celsius);
  if (coldest === undefined) throw new QuantityError('printed points', 'none', 'at least one point');
  for (const point of points) {
    temperature('celsius of a printed point', point.celsius);
    positive('minutes of a printed point', point.minutes);
  }
  let colder = coldest;
  for (const point of hotter) {
    if (point.celsius === colder.celsius) {
      throw new QuantityError('printed points', `${point.celsius} C twice`, 'at different temperatures');
    }
    if (point.minutes > colder.minutes) {
      const given = `${colder.minutes} min at ${colder.celsius} C and ${point.minutes} min at ${point.celsius} C`;
      throw new QuantityError('printed points', given, 'no slower when hotter');
    }
    colder = point;
  }
  return [coldest, ...hotter];
}

export type RangeCode = 'below-printed-temperatures' | 'above-printed-temperatures';

/** Where a temperature lies outside what the sheet prints: the code and the printed end that was passed; else null. */
export function outsidePrinted(
  celsius: number,
  coldestCelsius: number,
  hottestCelsius: number,
): { code: RangeCode; value: number; limit: number } | null {
  if (celsius < coldestCelsius) return { code: 'below-printed-temperatures', value: celsius, limit: coldestCelsius };
  if (celsius > hottestCelsius) return { code: 'above-printed-temperatures', value: celsius, limit: hottestCelsius };
  return null;
}
