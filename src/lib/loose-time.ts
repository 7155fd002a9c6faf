const shape = /^(\d{1,2})(?:\s*[:.,h]\s*(\d{2})|(\d{2}))?\s*h?\s*(am|pm|a|p)?$/;

/**
 * Minutes since midnight from a time typed loosely (`9`, `930`, `9:30`, `14.15`, `9h30`, `2 pm`), or null where it is
 * none.
 */
export function parseLooseTime(text: string): number | null {
  const plain = text
    .trim()
    .toLowerCase()
    .replaceAll(/([ap])\.?m\.?$/g, '$1m');
  const match = shape.exec(plain);
  if (!match) return null;
  const half = match[4]?.charAt(0);
  const minutes = Number(match[2] ?? match[3] ?? 0);
  const typed = Number(match[1]);
  if (minutes > 59 || typed > 23 || (half !== undefined && (typed < 1 || typed > 12))) return null;
  const hours = half === undefined ? typed : (typed % 12) + (half === 'p' ? 12 : 0);
  return hours * 60 + minutes;
}
