import { WIEN_MICROMETRE_KELVIN } from '#chemistry/constants.ts';
import { positive } from '#chemistry/quantity.ts';

export type WaveBand = 'short' | 'medium' | 'long';

/** Upper ends of the bands, micrometres: short to 1.4, medium to 3. */
const SHORT_TO_MICROMETRES = 1.4;
const MEDIUM_TO_MICROMETRES = 3;

/** Where an emitter of that temperature glows most (Wien): 2500 K at 1.159 micrometres, 1200 K at 2.415. */
export function peakMicrometres(emitterKelvin: number): number {
  return WIEN_MICROMETRE_KELVIN / positive('emitterKelvin', emitterKelvin);
}

export function waveBand(emitterKelvin: number): WaveBand {
  const peak = peakMicrometres(emitterKelvin);
  if (peak <= SHORT_TO_MICROMETRES) return 'short';
  return peak <= MEDIUM_TO_MICROMETRES ? 'medium' : 'long';
}

/**
 * A medium-wave lamp takes about twice as long as a short-wave one (a trade article, published). Only for a sheet that prints
 * the short-wave time alone; a printed medium-wave time goes before it. Long-wave heaters are no cure lamps: null.
 */
export function lampMinutesForBand(shortWaveMinutes: number, band: WaveBand): number | null {
  const minutes = positive('shortWaveMinutes', shortWaveMinutes);
  switch (band) {
    case 'short':
      return minutes;
    case 'medium':
      return minutes * 2;
    case 'long':
      return null;
  }
}
