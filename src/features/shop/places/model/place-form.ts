import * as z from 'zod';
import { defaultAirFlow } from '#chemistry/purge/default-air-flow.ts';
import { cubicMetresFromCubicFeet, cubicMetresPerHourFromCfm } from '#chemistry/units/air-flow.ts';
import { placeKind } from '#contracts/common.ts';
import type { Place, PlaceFields } from '#contracts/places.ts';
import type { Reader } from '#src/lib/formats.ts';
import { readTyped, typedMaybe, typedName, typedNumber, typedOf } from '../../parts/typed.ts';
import { readWith, type FormRead } from '../../parts/use-typed-form.ts';

/** A place as it is typed. */
export type PlaceForm = {
  kind: Place['kind'];
  name: string;
  /** Empty: no zone; `new`: the one named beside it. */
  zoneId: string;
  units: string;
  bakes: boolean;
  bakeLimit: string;
  volume: string;
  airFlow: string;
  clearance: string;
};

export const newPlace = (kind: Place['kind'] = 'booth'): PlaceForm => ({
  kind,
  name: '',
  zoneId: '',
  units: kind === 'rack' ? '12' : '4',
  bakes: false,
  bakeLimit: '',
  volume: '',
  airFlow: '',
  clearance: '',
});

const fahrenheit = (celsius: number): number => (celsius * 9) / 5 + 32;

export const formOf = (place: Place, unit: Reader['unit']): PlaceForm => ({
  kind: place.kind,
  name: place.name,
  zoneId: place.zoneId ?? '',
  units: String(place.units),
  bakes: place.bakes,
  // Never more than it is: a limit is rounded down.
  bakeLimit:
    place.bakeLimitCelsius === null
      ? ''
      : String(
          Math.floor((unit === 'C' ? place.bakeLimitCelsius : fahrenheit(place.bakeLimitCelsius)) * 10 + 1e-6) / 10,
        ),
  volume: typedOf(place.volumeM3),
  airFlow: typedOf(place.airFlowM3PerHour),
  clearance: place.clearanceMinutes === 0 ? '' : String(place.clearanceMinutes),
});

/** `96`, `96 m3`, `3024 ft3`: cubic metres; null where it is none. */
export function readVolume(text: string): number | null {
  const [, number = '', unit = 'm3'] = /^([\d.,\s]+?)\s*(m3|m³|ft3|ft³|cu ?ft)?$/i.exec(text.trim()) ?? [];
  const read = readTyped(number);
  if (read === null) return null;
  return /^m/i.test(unit) ? read : cubicMetresFromCubicFeet(read);
}

/** `20000`, `20000 m3/h`, `12000 cfm`: cubic metres an hour; null where it is none. */
export function readAirFlow(text: string): number | null {
  const [, number = '', unit = 'm3/h'] = /^([\d.,\s]+?)\s*(m3\/h|m³\/h|cfm)?$/i.exec(text.trim()) ?? [];
  const read = readTyped(number);
  if (read === null) return null;
  return /^cfm$/i.test(unit) ? cubicMetresPerHourFromCfm(read) : read;
}

const quantity = (read: (text: string) => number | null, range: { min: number; max: number }, example: string) =>
  z.string().transform((text, context) => {
    if (text.trim() === '') return null;
    const number = read(text);
    if (number !== null && number >= range.min && number <= range.max) return Math.round(number * 100) / 100;
    context.addIssue({ code: 'custom', message: `Enter it as ${example}.` });
    return z.NEVER;
  });

const bakeLimit = (unit: Reader['unit']) =>
  z.string().transform((text, context) => {
    if (text.trim() === '') return null;
    const number = readTyped(text);
    const celsius = number === null ? NaN : unit === 'C' ? number : ((number - 32) * 5) / 9;
    if (celsius >= 20 && celsius <= 100) return Math.floor(celsius * 100 + 1e-6) / 100;
    context.addIssue({
      code: 'custom',
      message: `Enter a temperature from ${unit === 'C' ? '20 to 100' : '68 to 212'} °${unit}.`,
    });
    return z.NEVER;
  });

/** The fields of the contract, or what is wrong with what was typed. A rack neither bakes nor is purged. */
export function readPlaceForm(form: PlaceForm, unit: Reader['unit']): FormRead<PlaceForm, PlaceFields> {
  const schema = z
    .object({
      kind: placeKind,
      name: typedName,
      zoneId: z.string(),
      units: typedNumber({ min: 1, max: 1000, whole: true }),
      bakes: z.boolean(),
      bakeLimit: bakeLimit(unit),
      volume: quantity(readVolume, { min: 0.1, max: 100_000 }, '96 (cubic metres) or 3024 ft3'),
      airFlow: quantity(readAirFlow, { min: 1, max: 1_000_000 }, '20000 (cubic metres an hour) or 12000 cfm'),
      clearance: typedMaybe({ min: 1, max: 240, whole: true }),
    })
    .transform(({ kind, bakes, bakeLimit, volume, airFlow, clearance, zoneId, ...rest }) => {
      const isRack = kind === 'rack';
      return {
        ...rest,
        kind,
        zoneId: zoneId === '' || isRack ? null : zoneId,
        bakes: bakes && kind === 'booth',
        bakeLimitCelsius: bakes && kind === 'booth' ? bakeLimit : null,
        volumeM3: isRack ? null : volume,
        airFlowM3PerHour: isRack ? null : airFlow,
        clearanceMinutes: isRack ? 0 : (clearance ?? 0),
      };
    });
  return readWith(schema, form);
}

/** Air flow where none was measured: width times height of the face that the air crosses, at 0.508 m/s. */
export function flowFromFace(width: string, height: string): number | null {
  const [w, h] = [readTyped(width), readTyped(height)];
  return w === null || h === null || w <= 0 || h <= 0 ? null : Math.round(defaultAirFlow(w * h));
}
