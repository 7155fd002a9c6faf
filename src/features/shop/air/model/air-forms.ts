import * as z from 'zod';
import type { AirHours, AirSettings } from '#contracts/air.ts';
import type { Formats } from '#src/lib/formats.ts';
import { typedNumber, readTyped } from '../../parts/typed.ts';
import { readWith, type FormRead } from '../../parts/use-typed-form.ts';

type Unit = Formats['unit'];

const hundredth = (value: number): number => Math.round(value * 100) / 100;
export const celsiusFrom = (value: number, unit: Unit): number => hundredth(unit === 'C' ? value : (value - 32) / 1.8);
export const shownTemperature = (celsius: number, unit: Unit): string =>
  String(hundredth(unit === 'C' ? celsius : celsius * 1.8 + 32));
/** A difference has no zero point. */
const degreesFrom = (value: number, unit: Unit): number => hundredth(unit === 'C' ? value : value / 1.8);
const shownDegrees = (celsius: number, unit: Unit): string => String(hundredth(unit === 'C' ? celsius : celsius * 1.8));

/** A temperature typed in the reader's unit, as Celsius. */
const temperature = (unit: Unit, min: number, max: number) =>
  z.string().transform((text, context) => {
    const typed = readTyped(text);
    const celsius = typed === null ? NaN : celsiusFrom(typed, unit);
    if (celsius >= min && celsius <= max) return celsius;
    const said = [min, max].map((limit) => shownTemperature(limit, unit)).join(' to ');
    context.addIssue({ code: 'custom', message: `Enter a temperature from ${said} °${unit}.` });
    return z.NEVER;
  });
const degrees = (unit: Unit, min: number, max: number) =>
  z.string().transform((text, context) => {
    const typed = readTyped(text);
    const celsius = typed === null ? NaN : degreesFrom(typed, unit);
    // 5.4 F are 3 C, to the hundredth.
    if (celsius >= min - 1e-9 && celsius <= max) return celsius;
    const said = [min, max].map((limit) => shownDegrees(limit, unit)).join(' to ');
    context.addIssue({ code: 'custom', message: `Enter ${said} °${unit}.` });
    return z.NEVER;
  });
const humidity = typedNumber({ min: 0, max: 100 });

export type ReadingForm = { celsius: string; humidity: string; surface: string; day: string; time: string };
export const readReadingForm =
  (unit: Unit) =>
  (form: ReadingForm): FormRead<ReadingForm, { celsius: number; humidity: number; surface: number | null }> =>
    readWith(
      z.object({
        celsius: temperature(unit, -20, 60),
        humidity,
        surface: z.union([z.literal('').transform(() => null), temperature(unit, -20, 120)]),
      }),
      form,
    );

export type SettingsForm = Record<
  'celsius' | 'humidity' | 'staleCelsius' | 'staleHumidity' | 'fresh' | 'margin',
  string
>;
export const settingsForm = (now: AirSettings, unit: Unit): SettingsForm => ({
  celsius: shownTemperature(now.defaultCelsius, unit),
  humidity: String(now.defaultHumidity),
  staleCelsius: shownDegrees(now.staleCelsius, unit),
  staleHumidity: String(now.staleHumidity),
  fresh: String(now.freshMinutes),
  margin: shownDegrees(now.marginCelsius, unit),
});
export const readSettingsForm =
  (unit: Unit) =>
  (form: SettingsForm): FormRead<SettingsForm, Omit<AirSettings, 'version'>> => {
    const read = readWith(
      z.object({
        celsius: temperature(unit, -20, 60),
        humidity,
        staleCelsius: degrees(unit, 0.5, 20),
        staleHumidity: typedNumber({ min: 1, max: 60 }),
        fresh: typedNumber({ min: 5, max: 1440, whole: true }),
        margin: degrees(unit, 3, 15),
      }),
      form,
    );
    if (read.value === null) return read;
    const { celsius, humidity: damp, fresh, margin, ...stale } = read.value;
    const value = { ...stale, defaultCelsius: celsius, defaultHumidity: damp, freshMinutes: fresh };
    return { value: { ...value, marginCelsius: Math.max(3, margin) }, faults: null };
  };

/** A row of a schedule as typed. */
export type HoursRow = { from: string; to: string; celsius: string; humidity: string };
export type HoursForm = { rows: HoursRow[] };
export const hoursRow = ({ fromHour, toHour, celsius, humidity: damp }: AirHours, unit: Unit): HoursRow => ({
  from: String(fromHour),
  to: String(toHour),
  celsius: shownTemperature(celsius, unit),
  humidity: String(damp),
});

/** The rows as the contract wants them, or the first thing that is wrong, by row. */
export function readHours(
  rows: readonly HoursRow[],
  unit: Unit,
): { value: AirHours[] } | { row: number; fault: string } {
  const schema = z.object({
    from: typedNumber({ min: 0, max: 23, whole: true }),
    to: typedNumber({ min: 1, max: 24, whole: true }),
    celsius: temperature(unit, -20, 60),
    humidity,
  });
  const value: AirHours[] = [];
  for (const [row, typed] of rows.entries()) {
    const read = schema.safeParse(typed);
    if (!read.success) return { row, fault: read.error.issues[0]?.message ?? 'This row is not complete.' };
    const { from, to, celsius, humidity: damp } = read.data;
    if (to <= from) return { row, fault: 'It ends before it begins.' };
    if (value.some((other) => from < other.toHour && other.fromHour < to))
      return { row, fault: 'Another row speaks of the same hour.' };
    value.push({ fromHour: from, toHour: to, celsius, humidity: damp });
  }
  return value.length === 0 ? { row: -1, fault: 'Add at least one row of hours.' } : { value };
}
