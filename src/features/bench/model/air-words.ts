import type { SprayAir } from '#contracts/bench.ts';
import { formatDegrees, type Formats } from '#src/lib/formats.ts';

export type AirStanding = { tone: 'room' | 'closing' | 'late'; words: string };

/** What the air says to spraying now; null where nothing has to be said. */
export function airStanding(air: SprayAir | null, { unit, temperature }: Formats): AirStanding | null {
  if (air === null) return null;
  const { gate, reading, zoneName } = air;
  const where = zoneName === null ? '' : ` in ${zoneName}`;
  if (gate === null || reading === null)
    return { tone: 'closing', words: `Nobody has measured the air${where}. Measure before you spray` };
  const read = `${temperature(reading.celsius)} and ${Math.round(reading.humidity)} %${where}`;
  if (!gate.fresh)
    return { tone: 'closing', words: `The air was last measured too long ago. Measure before you spray` };
  if (gate.marginCelsius === null) return { tone: 'room', words: `Air ${read}` };
  const margin = formatDegrees(gate.marginCelsius, unit);
  if (gate.open) return { tone: 'room', words: `Air ${read}, ${margin} over the dew point` };
  return {
    tone: 'late',
    words: `Do not spray: ${read}, only ${margin} over the dew point; ${formatDegrees(gate.neededCelsius, unit)} are asked`,
  };
}
