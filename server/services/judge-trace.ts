import { gunzip } from 'node:zlib';
import { promisify } from 'node:util';
import { setImmediate as breathe } from 'node:timers/promises';
import { HAIR } from '#chemistry/constants.ts';
import { minutesStillToCure } from '#chemistry/cure/cure-minutes-at.ts';
import { equivalentMinutes } from '#chemistry/cure/equivalent-minutes.ts';
import { cureKinetics, type Kinetics } from '#chemistry/cure/kinetics.ts';
import type { TraceRow } from '#chemistry/cure/trace.ts';
import type { PrintedPoint } from '#chemistry/printed-points.ts';
import { MOST_TRACE_BYTES, type TraceVerdict } from '#contracts/traces.ts';
import { Refusal } from '../errors.ts';

/** Rows that are worked through before other requests get their turn: a few milliseconds. */
const SLICE = 2_000;
const CURVE_POINTS = 200;
const unpack = promisify(gunzip);

export type Judged = { verdict: TraceVerdict; curve: [number, number][]; file: Buffer };
type Question = {
  points: readonly PrintedPoint[];
  earlierMinutes: number;
  limitCelsius: number | null;
  hottestCelsius: number | null;
};

const refuse = (message: string): Refusal => new Refusal('bad-request', { fields: [{ path: 'body.rows', message }] });

/**
 * Judges packed readings in slices, so that a hundred thousand of them hold nobody up; splitting a trace changes nothing of
 * what it earned. @throws {Refusal} bad-request for what are no readings, with the line.
 */
export async function judgeTrace(packed: string, question: Question): Promise<Judged> {
  const file = Buffer.from(packed, 'base64');
  const trace = await readRows(file);
  const kinetics = kineticsOf(question.points);
  let done = question.earlierMinutes;
  let longestGapMinutes = 0;
  let peakCelsius = -Infinity;
  for (let at = 0; at < trace.length; at += SLICE) {
    const stretch = trace.slice(at, at + SLICE + 1);
    done += equivalentMinutes(stretch, kinetics);
    for (const [i, row] of stretch.entries()) {
      peakCelsius = Math.max(peakCelsius, row.metalCelsius);
      longestGapMinutes = Math.max(longestGapMinutes, row.minutes - (stretch[i - 1]?.minutes ?? row.minutes));
    }
    await breathe();
  }
  const { limitCelsius, hottestCelsius } = question;
  const cured = done >= kinetics.referenceMinutes * (1 - HAIR);
  const hottest = Math.max(peakCelsius, hottestCelsius ?? peakCelsius);
  return {
    file,
    curve: curveOf(trace),
    verdict: {
      cured,
      doneMinutes: done,
      neededMinutes: kinetics.referenceMinutes,
      leftMinutes: cured ? 0 : minutesStillToCure(kinetics, done, kinetics.referenceCelsius).minutes,
      referenceCelsius: kinetics.referenceCelsius,
      peakCelsius,
      hottestCelsius,
      limitCelsius,
      tooHot: limitCelsius !== null && hottest > limitCelsius + HAIR,
      longestGapMinutes,
      lengthMinutes: (trace.at(-1)?.minutes ?? 0) - (trace[0]?.minutes ?? 0),
      rows: trace.length,
    },
  };
}

/** Two lines of which the hotter is no faster: one of them was mistyped, and only the bake is used. */
function kineticsOf(points: readonly PrintedPoint[]): Kinetics {
  const [coldest, hottest] = points.toSorted((a, b) => a.celsius - b.celsius);
  if (!coldest)
    throw new Refusal('bad-request', { fields: [{ path: 'body.points', message: 'no cure time is known' }] });
  if (!hottest) return cureKinetics([coldest]);
  return cureKinetics(
    coldest.celsius < hottest.celsius && coldest.minutes > hottest.minutes ? [coldest, hottest] : [hottest],
  );
}

async function readRows(file: Buffer): Promise<TraceRow[]> {
  const text = await textOf(file);
  const lines = text.split('\n');
  const trace: TraceRow[] = [];
  let before = -Infinity;
  for (const [i, line] of lines.entries()) {
    if (i % SLICE === SLICE - 1) await breathe();
    if (line === '' && i === lines.length - 1) continue;
    const found = /^(-?\d+(?:\.\d+)?),(-?\d+(?:\.\d+)?)\r?$/.exec(line);
    const [minutes, metalCelsius] = [Number(found?.[1]), Number(found?.[2])];
    if (!found) throw refuse(`line ${i + 1} is no reading`);
    if (minutes < before) throw refuse(`line ${i + 1}: the time goes back`);
    if (metalCelsius < -60 || metalCelsius > 600) throw refuse(`line ${i + 1} is no temperature of a panel`);
    trace.push({ minutes, metalCelsius });
    before = minutes;
  }
  if (trace.length < 2) throw refuse('fewer than two readings');
  return trace;
}

async function textOf(file: Buffer): Promise<string> {
  try {
    const bytes = await unpack(file, { maxOutputLength: MOST_TRACE_BYTES });
    return bytes.toString('latin1');
  } catch {
    throw refuse('cannot be unpacked, or holds too much');
  }
}

/** Of every stretch the coldest and the hottest reading, in their order. */
function curveOf(trace: readonly TraceRow[]): [number, number][] {
  const pairs = trace.map(({ minutes, metalCelsius }): [number, number] => [minutes, metalCelsius]);
  if (pairs.length <= CURVE_POINTS) return pairs;
  const stretches = CURVE_POINTS / 2;
  return Array.from({ length: stretches }, (_, i) => {
    const part = pairs.slice(
      Math.floor((i * pairs.length) / stretches),
      Math.floor(((i + 1) * pairs.length) / stretches),
    );
    const low = part.reduce((a, b) => (b[1] < a[1] ? b : a));
    const high = part.reduce((a, b) => (b[1] > a[1] ? b : a));
    return low[0] <= high[0] ? [low, high] : [high, low];
  }).flat();
}
