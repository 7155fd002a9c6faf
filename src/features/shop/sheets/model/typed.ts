import { parseLooseDuration } from '../../parts/loose-duration.ts';

const LONGEST = 20_160;

/** Minutes as they would be typed: `45`, `3 h`, `1:30`, `3 d`. */
export function typeMinutes(minutes: number): string {
  if (minutes < 120) return String(minutes);
  if (minutes % 1440 === 0) return `${minutes / 1440} d`;
  if (minutes % 60 === 0) return `${minutes / 60} h`;
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`;
}

/** Whole minutes of two weeks at most; null where it is no length of time. */
export function readMinutes(text: string): number | null {
  const minutes = parseLooseDuration(text);
  return minutes !== null && minutes >= 0 && minutes <= LONGEST ? minutes : null;
}

/** Degrees in the reader's unit as they would be typed, never more than they are. */
export function typeDegrees(celsius: number, unit: 'C' | 'F'): string {
  const degrees = unit === 'C' ? celsius : (celsius * 9) / 5 + 32;
  // A hair is forgiven: (120 - 32) * 5 / 9 and back may fall short of 120.
  return String(Math.floor(degrees * 1000 + 1e-6) / 1000);
}

/** Celsius from degrees in the reader's unit; null where it is no temperature of an oven. */
export function readDegrees(text: string, unit: 'C' | 'F'): number | null {
  const plain = text.trim().replace(',', '.');
  if (!/^\d+(\.\d+)?$/.test(plain)) return null;
  const celsius = unit === 'C' ? Number(plain) : ((Number(plain) - 32) * 5) / 9;
  return celsius >= 20 && celsius <= 200 ? celsius : null;
}
