import { addBakes } from '#chemistry/cure/add-bakes.ts';
import { timeRatio } from '#chemistry/cure/arrhenius.ts';
import { cureMinutesAt, minutesStillToCure, type CureCode } from '#chemistry/cure/cure-minutes-at.ts';
import { cureKinetics } from '#chemistry/cure/kinetics.ts';
import { hold } from '#chemistry/cure/trace.ts';
import type { Finding } from '#chemistry/finding.ts';
import { readRows, type Values } from './desk-state.ts';
import { numberFault, ranges, reader, temperatureFault, type Answer, type Errors } from './reader.ts';
import { cureOf, type CureOf, type Sheet } from './sheet-of.ts';
import type { Unit } from './typed.ts';

const bakeRange = { least: 0, most: 200 };
const energyRange = { least: 1, most: 200 };

/** kJ/mol where a sound figure is typed. */
export function typedEnergy({ ea }: Values): number | null {
  const found = numberFault(ea, energyRange);
  return typeof found === 'number' ? found : null;
}

export type Energy = { kilojoulesPerMole: number; from: CureOf['energyFrom'] };
export type Equivalent = {
  energy: Energy;
  minutes: number;
  fromCelsius: number;
  toCelsius: number;
  equivalentMinutes: number;
  findings: Finding<CureCode>[];
  /** Temperatures the sheet prints, where the energy is its own. */
  printed: { coldest: number; hottest: number } | null;
};

/** "30 min at 60 C is how long at 50 C?" */
export function equivalentAnswer(values: Values, sheet: Sheet, unit: Unit): Answer<Equivalent> {
  const read = reader(values, unit);
  const minutes = read.number('min', ranges.minutes);
  const fromCelsius = read.celsius('from', bakeRange);
  const toCelsius = read.celsius('to', bakeRange);
  const typed = values.ea.trim() === '' ? null : read.number('ea', energyRange);
  return read.answer(() => {
    const cure = cureOf(sheet, typed);
    const kinetics = cure?.kinetics ?? cureKinetics([{ minutes, celsius: fromCelsius }], typed ?? undefined);
    const fitted = cure?.energyFrom === 'sheet';
    const findings: Finding<CureCode>[] = kinetics.findings.filter(
      (finding) => typed === null || finding.code !== 'activation-energy-assumed',
    );
    if (fitted)
      for (const celsius of [fromCelsius, toCelsius])
        for (const finding of cureMinutesAt(kinetics, celsius).findings)
          if (!findings.some(({ code }) => code === finding.code)) findings.push(finding);
    return {
      energy: {
        kilojoulesPerMole: kinetics.kilojoulesPerMole,
        from: typed === null ? (cure?.energyFrom ?? 'default') : 'typed',
      },
      minutes,
      fromCelsius,
      toCelsius,
      equivalentMinutes: minutes * timeRatio(toCelsius, fromCelsius, kinetics.kilojoulesPerMole),
      findings,
      printed: fitted ? { coldest: kinetics.coldestCelsius, hottest: kinetics.hottestCelsius } : null,
    };
  });
}

/** Minutes that equal the bake over a span of temperatures, for drawing. */
export function equivalentCurve(answer: Equivalent): { celsius: number; minutes: number }[] {
  const [low, high] = [Math.min(answer.fromCelsius, answer.toCelsius), Math.max(answer.fromCelsius, answer.toCelsius)];
  const room = Math.max(5, (high - low) * 0.4);
  return Array.from({ length: 61 }, (_, i) => {
    const celsius = Math.max(0, low - room) + ((high + room - Math.max(0, low - room)) * i) / 60;
    const ratio = timeRatio(celsius, answer.fromCelsius, answer.energy.kilojoulesPerMole);
    return { celsius, minutes: answer.minutes * ratio };
  });
}

export type BakeSum = {
  cure: CureOf;
  /** What each row was worth, in minutes at the reference temperature. */
  worth: number[];
  done: number;
  leftAtReference: number;
  restCelsius: number;
  restMinutes: number;
  findings: Finding<CureCode>[];
};

/** Bakes had so far, added up, and what is still to bake. Null where the sheet prints no cure time. */
export function bakeSum(values: Values, sheet: Sheet, unit: Unit): Answer<BakeSum> | null {
  const cure = cureOf(sheet, typedEnergy(values));
  if (!cure) return null;
  const read = reader(values, unit);
  const rows = readRows(values.bakes).map(([minutes = '', celsius = ''], i) => ({
    minutes: keep(read.errors, `bakes.${i}.minutes`, numberFault(minutes, ranges.minutesOrNone)),
    celsius: keep(read.errors, `bakes.${i}.celsius`, temperatureFault(celsius, bakeRange, unit)),
  }));
  const restCelsius = read.celsius('rest', bakeRange);
  if (values.ea.trim() !== '') read.number('ea', energyRange);
  return read.answer(() => {
    const { kinetics } = cure;
    const bakes = rows.map(({ minutes, celsius }) => hold(celsius, minutes));
    const done = addBakes(bakes, kinetics);
    const rest = minutesStillToCure(kinetics, done, restCelsius);
    return {
      cure,
      worth: bakes.map((bake) => addBakes([bake], kinetics)),
      done,
      leftAtReference: Math.max(0, kinetics.referenceMinutes - done),
      restCelsius,
      restMinutes: rest.wholeMinutes,
      findings: rest.findings,
    };
  });
}

function keep(errors: Errors, name: string, found: number | string): number {
  if (typeof found === 'number') return found;
  errors[name] = found;
  return NaN;
}
