import { celsiusFromFahrenheit, fahrenheitFromCelsius } from '#chemistry/units/temperature.ts';
import { parseLooseDuration } from '../../parts/loose-duration.ts';
import { readTyped } from '../../parts/typed.ts';

type Unit = 'C' | 'F';

/** Minutes as somebody would type them, to the minute: `45`, `2 h`, `1 h 30 min`, `3 days`. */
export function typedMinutes(minutes: number | null): string {
  if (minutes === null) return '';
  if (minutes >= 2880 && minutes % 1440 === 0) return `${minutes / 1440} days`;
  if (minutes < 120) return String(minutes);
  const rest = minutes % 60;
  return `${Math.floor(minutes / 60)} h${rest === 0 ? '' : ` ${rest} min`}`;
}

/** A stored temperature in the reader's unit, exact enough to come back as it was. */
export const typedTemperature = (celsius: number | null, unit: Unit): string =>
  celsius === null ? '' : String(Number((unit === 'C' ? celsius : fahrenheitFromCelsius(celsius)).toFixed(2)));

export type Faults = Partial<Record<string, string>>;
type Range = { least: number; most: number };

/** Reads what was typed, field by field, and gathers what is wrong. A wrong figure reads as NaN. */
export function figureReader<Form extends Record<string, string>>(form: Form, unit: Unit) {
  const faults: Faults = {};
  const fault = (key: keyof Form & string, text: string): number => {
    faults[key] ??= text;
    return NaN;
  };
  const isEmpty = (key: keyof Form & string): boolean => (form[key] ?? '').trim() === '';
  const ranged = (key: keyof Form & string, value: number | null, { least, most }: Range, said: string): number =>
    value === null || value < least || value > most ? fault(key, said) : value;
  return {
    faults,
    fault,
    isEmpty,
    minutes: (key: keyof Form & string, least = 0): number =>
      isEmpty(key)
        ? fault(key, 'Enter the time: 0 where there is none.')
        : ranged(
            key,
            parseLooseDuration(form[key] ?? ''),
            { least, most: 20_160 },
            `Enter a time such as 45, 1 h 30 or 3 days${least > 0 ? ', a minute or more' : ''}.`,
          ),
    celsius: (key: keyof Form & string, range: Range = { least: -10, most: 200 }): number => {
      const typed = readTyped(form[key] ?? '');
      const celsius = typed === null ? null : unit === 'C' ? typed : rounded(typed);
      const said = (edge: number) => Number(typedTemperature(edge, unit)).toFixed(0);
      return ranged(key, celsius, range, `Enter °${unit} from ${said(range.least)} to ${said(range.most)}.`);
    },
    number: (key: keyof Form & string, range: Range & { whole?: boolean }): number => {
      const typed = readTyped(form[key] ?? '');
      const fits = typed !== null && (!range.whole || Number.isInteger(typed));
      const said = `Enter a ${range.whole ? 'whole ' : ''}number from ${range.least} to ${range.most}.`;
      return ranged(key, fits ? typed : null, range, said);
    },
  };
}

/** 120 °F is 48.889 °C; a thousandth is closer than any thermometer. */
const rounded = (fahrenheit: number): number | null =>
  fahrenheit > -459 && fahrenheit < 3000 ? Math.round(celsiusFromFahrenheit(fahrenheit) * 1000) / 1000 : null;
