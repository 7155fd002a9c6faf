const pieces =
  /^(?:(\d+(?:[.,]\d+)?)\s*(?:d|days?))?\s*(?:(\d+(?:[.,]\d+)?)\s*(?:h|hrs?|hours?))?\s*(?:(\d+)\s*(?:m|min|mins|minutes?)?)?$/;

const numberOf = (text: string | undefined): number => Number((text ?? '0').replace(',', '.'));

/**
 * Minutes from a length typed loosely: `90`, `90 min`, `2 h`, `1.5 h`, `1 h 30`, `1:30`, `2 days 3 h`; null where it is
 * none. A bare number is minutes.
 */
export function parseLooseDuration(text: string): number | null {
  const plain = text.trim().toLowerCase();
  const clock = /^(\d{1,3}):([0-5]\d)$/.exec(plain);
  if (clock) return Number(clock[1]) * 60 + Number(clock[2]);
  const match = plain === '' ? null : pieces.exec(plain);
  if (!match) return null;
  return Math.round(numberOf(match[1]) * 1440 + numberOf(match[2]) * 60 + numberOf(match[3]));
}
