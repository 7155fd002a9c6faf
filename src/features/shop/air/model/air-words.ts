import type { AirGate, AirSource } from '#contracts/air.ts';
import { formatDegrees, type Formats } from '#src/lib/formats.ts';

export type Tone = 'moss' | 'amber' | 'crimson' | 'muted';

/** One decimal, in the reader's unit: `16.4 °C`. */
export const exactTemperature = (celsius: number, unit: Formats['unit']): string =>
  `${(unit === 'C' ? celsius : celsius * 1.8 + 32).toFixed(1)} °${unit}`;

export const percent = (humidity: number): string => `${Math.round(humidity)} %`;

/** What the gate before spraying says, in words. */
export function gateWords(gate: AirGate | null, unit: Formats['unit']): { tone: Tone; words: string } {
  if (gate === null) return { tone: 'muted', words: 'Nobody has measured here yet.' };
  const needed = formatDegrees(gate.neededCelsius, unit);
  const surface = gate.surfaceMeasured ? 'the surface' : 'a surface as warm as the air';
  if (gate.marginCelsius === null) return { tone: 'moss', words: 'Quite dry air: nothing sweats in it.' };
  const margin = formatDegrees(Math.abs(gate.marginCelsius), unit);
  const where = `${surface} is ${margin} ${gate.marginCelsius < 0 ? 'under' : 'over'} the dew point`;
  if (!gate.fresh) return { tone: 'amber', words: `Measured too long ago to count. Then ${where}.` };
  if (!gate.open) return { tone: 'crimson', words: `Do not spray: ${where}, and has to be ${needed} over it.` };
  return { tone: 'moss', words: `May be sprayed: ${where}, ${needed} are asked.` };
}

export const sourceWords: Record<AirSource, string> = {
  default: 'the shop’s usual air',
  latest: 'the latest reading',
  schedule: 'hours of the day',
};

/** `12 min ago`, `3 h ago`, or the moment. */
export function agoWords(at: string, now: number, formats: Formats): string {
  const minutes = Math.round((now - Date.parse(at)) / 60_000);
  if (minutes < 1) return 'just now';
  return minutes < 24 * 60 ? `${formats.duration(minutes)} ago` : formats.dateTime(at);
}
