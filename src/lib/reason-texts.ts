import type { Reason } from '#contracts/reasons.ts';
import type { ViolationCode } from '#planner/types.ts';
import { sheetFaultCode } from '#contracts/sheet-faults.ts';
import { formatDegrees, type Formats } from './formats.ts';
import { sheetFaultText } from './sheet-fault-texts.ts';

/** Codes that services add to the planner's. */
type ServiceCode =
  | 'heat-limit'
  | 'heat-minutes'
  | 'heat-unknown'
  | 'booth-heat'
  | 'purge-unknown'
  | 'no-purge'
  | 'no-place'
  | 'no-person'
  | 'no-trained-person'
  | 'no-lamps'
  | 'nothing-to-stay-on'
  | 'training-lapsed'
  | 'job-withdrawn'
  | 'job-done'
  | 'stage-running'
  | 'not-booked'
  | 'previous-not-done'
  | 'not-started'
  | 'last-owner'
  | 'dew-point'
  | 'flash-past-window'
  | 'still-booked'
  | 'still-used-by';

type Say = (
  r: { names: Get; at: Get; minutes: (i: number) => number; count: number; rule: number | null },
  f: Formats,
) => string;
type Get = (i: number) => string;

const texts: Record<ViolationCode | ServiceCode, Say> = {
  // 1 Order
  'unknown-stage': () => 'This stage is no longer part of the job.',
  'assigned-twice': () => 'This stage would be booked twice.',
  'half-unplaced': () => 'Only part of the job would be booked; a job is planned whole.',
  'unplaced-without-reason': () => 'The job was left out without a reason.',
  'stage-missing': () => 'A stage of the job would have no booking; a job is planned whole.',
  'unknown-mode': ({ names }) => `${names(0)} is not a way to do this stage.`,
  'phase-count': ({ minutes }) => `It has ${minutes(0)} phases and needs ${minutes(1)}.`,
  'not-whole-minutes': () => 'Its times are not whole minutes.',
  'ends-not-of-phases': () => 'Its start and end are not those of its phases.',
  'before-now': ({ at }) => `It would start ${at(0)}, and it is ${at(1)} already.`,
  'after-horizon': ({ at }) => `It would end ${at(0)}, after the last minute that is planned, ${at(1)}.`,
  'before-release': ({ at }) => `The job is there from ${at(1)}; this would start ${at(0)}.`,
  'unknown-place': () => 'That place does not exist any more.',
  'place-not-allowed': ({ names }) => `${names(0)} is no place for this stage.`,
  'previous-missing': () => 'The stage before it has no booking.',
  'phase-wait': ({ minutes }, f) =>
    `It would stand ${f.duration(minutes(1))} between two of its phases; at most ${f.duration(minutes(2))} will do.`,
  'phase-length': ({ minutes }, f) =>
    `One of its phases would take ${f.duration(minutes(1))}; it needs ${f.duration(minutes(2))}.`,
  // 2 Windows
  'too-soon': ({ names, minutes }, f) =>
    minutes(0) < 0
      ? `It would start ${f.duration(-minutes(0))} before ${names(0)} is over.`
      : `It would start ${f.duration(minutes(0))} after ${names(0)}; it needs at least ${f.duration(minutes(1))}.`,
  'too-late': ({ names, minutes }, f) =>
    `It would start ${f.duration(minutes(0))} after ${names(0)}; the window closes after ${f.duration(minutes(1))}.`,
  // 3 Holding a place
  'moved-while-staying': ({ names }) => `The part has to stay in ${names(0)}, where the stage before leaves it.`,
  // 4 One load at a time
  'does-not-fit': ({ names, minutes, rule }) =>
    rule === 1
      ? `${names(0)}: it takes ${minutes(0)} units of room, and the largest place has ${minutes(1)}.`
      : `It takes ${minutes(0)} units of room, and ${names(0)} has ${minutes(1)}.`,
  'place-taken': ({ names, at }) => `${names(0)} is taken by ${names(1)} until ${at(1)}.`,
  'rack-full': ({ names, at }) => `${names(0)} is full from ${at(0)}.`,
  // 5 Loads
  'load-not-shared': () => 'This stage does not share a booth run.',
  'load-differs': () => 'What shares a booth run starts together, in one place, with the same person and lamps.',
  'load-kinds-differ': () => 'Only stages with the same phases can share a booth run.',
  'load-too-big': ({ names, minutes }) =>
    `Together they take ${minutes(0)} units of room, and ${names(0)} has ${minutes(1)}.`,
  'load-parts': () => 'What shared the booth run and stays in it for the next stage has to stay together.',
  'load-is-fixed': () => 'The booth run it shares has begun or is pinned.',
  // 6 Clean-up
  'clean-up': ({ names, minutes }, f) =>
    `${names(0)} needs ${f.duration(minutes(1))} of clean-up next to ${names(1)}; ${f.duration(minutes(0))} are left.`,
  // 7 Closed
  'place-closed': ({ names, at }) => `${names(0)} is closed from ${at(0)} to ${at(1)}.`,
  'lamp-closed': ({ names, at }) => `${names(0)} cannot be used from ${at(0)} to ${at(1)}.`,
  // 8 Hands
  'person-not-allowed': ({ names }) => `${names(0)} may not do this stage: the skill for it is missing.`,
  'person-not-needed': ({ names }) => `Nobody is needed for it, yet ${names(0)} would be booked.`,
  'off-shift': ({ names, at }) => `${names(0)} is not at work for all of ${at(0)} to ${at(1)}.`,
  'person-busy': ({ names, at }) => `${names(0)} is busy with ${names(1)} from ${at(1)} to ${at(2)}.`,
  // 9 On the premises
  'nobody-there': ({ at }) => `From ${at(0)} to ${at(1)} somebody has to be on the premises, and nobody is.`,
  // 10 Lamps
  'wrong-lamps': ({ minutes, count }) => `It needs ${minutes(0)} lamps and has ${count}.`,
  'no-lamp-in-mode': () => 'A lamp would be on in a phase that has none.',
  'unknown-lamp': ({ names }) => `The lamp ${names(0)} cannot be used for it.`,
  'lamp-busy': ({ names, at, minutes }, f) =>
    `${names(0)} is needed by ${names(1)} until ${at(1)}${minutes(0) > 0 ? `, and takes ${f.duration(minutes(0))} to roll over` : ''}.`,
  // 11 Circuits
  'circuit-full': ({ names, at }) => `${names(0)} cannot carry one more lamp from ${at(0)}.`,
  // 12 Spray and lamps
  'spray-meets-lamp': ({ names, at }) =>
    `${names(1)} sprays in ${names(0)} from ${at(2)} to ${at(3)}; no lamp may be there, and it would be from ${at(0)} to ${at(1)}. The air has to be purged first.`,
  // 13 Fixed
  'fixed-missing': () => 'What has begun, is done or is pinned would be left out.',
  'fixed-changed': () => 'It has begun, is done or is pinned, and stays as it is.',
  // From services
  'heat-limit': ({ names, minutes }, f) =>
    `${names(0)} bakes at ${f.temperature(minutes(0))}, above the heat limit of ${f.temperature(minutes(1), 'limit')} of this vehicle or part.`,
  'heat-minutes': ({ names, minutes }, f) =>
    `${names(0)} needs ${f.duration(minutes(0))} of heat; this vehicle may have ${f.duration(minutes(1))} more over all its bakes.`,
  'heat-unknown': ({ names }) =>
    `${names(0)} heats, and its temperature is not known: no limit of part or vehicle could be kept.`,
  'booth-heat': ({ names, minutes }, f) => `${names(0)}: no booth may bake at ${f.temperature(minutes(0))}.`,
  'purge-unknown': ({ names }) =>
    `${names(0)}: no heat without a known purge. Volume and air flow of the booth are missing.`,
  'no-purge': ({ names }) => `${names(0)}: its process sheet leaves no time for the purge before heat.`,
  'no-place': ({ names }) => `${names(0)}: there is no place of the kind it needs.`,
  'no-person': ({ names }) => `${names(0)}: nobody on the roster has the skill for it.`,
  'no-trained-person': ({ names }) => `${names(0)}: nobody with the skill has spray training that is still good.`,
  'no-lamps': ({ names, minutes }) => `${names(0)} needs ${minutes(0)} lamps, and the shop has ${minutes(1)}.`,
  'nothing-to-stay-on': ({ names }) => `${names(0)} is done where the part stands, and nothing comes before it.`,
  'training-lapsed': ({ names }) => `The spray training of ${names(0)} has lapsed; no spraying until it is renewed.`,
  'job-withdrawn': ({ names }) => `${names(0)} has been withdrawn.`,
  'job-done': ({ names }) => `${names(0)} is done.`,
  'stage-running': ({ names }) => `A stage of ${names(0)} is running. Finish it first.`,
  'not-booked': () => 'This stage is not in the posted plan.',
  'previous-not-done': ({ names, count }) =>
    count > 0 ? `${names(0)} comes before it and is not done.` : 'The stage before it is not done.',
  'not-started': () => 'It has not been started.',
  'still-booked': ({ names, at }) => `${names(0)} has posted work: ${names(1)}, ${at(0)}.`,
  'still-used-by': ({ names, count }) =>
    `${names(0)} is still used by ${names(1)}${count > 2 ? ` and ${count - 2} more` : ''}.`,
  'flash-past-window': ({ names, minutes }, f) =>
    `${names(0)} has to flash ${f.duration(minutes(0))} in the air expected there, past the ${f.duration(minutes(1))} of its window.`,
  'dew-point': ({ names, at, minutes }, f) =>
    `Too near the dew point to spray${names(0) ? ` in ${names(0)}` : ''}: at ${at(0)} it was ${f.temperature(minutes(0))} and ${Math.round(minutes(1))} %, dew point ${f.temperature(minutes(3))}; the surface${minutes(6) === 1 ? '' : ', taken to be as warm as the air,'} is ${f.temperature(minutes(2))}, ${formatDegrees(minutes(4), f.unit)} over it, and has to be ${formatDegrees(minutes(5), f.unit)}. Warm the part or dry the air, and measure again.`,
  'last-owner': ({ names }) => `${names(0)} is the only owner. Make somebody else an owner first.`,
};

const rules = [
  'order',
  'windows',
  'holding a place',
  'one load at a time',
  'loads',
  'clean-up',
  'closed times',
  'hands',
  'somebody on the premises',
  'lamps',
  'circuits',
  'spray and lamps',
  'what is fixed',
];

/** `rule 2, windows`; empty where a reason comes from no planning rule. */
export const ruleText = (rule: number | null): string =>
  rule === null ? '' : `rule ${rule}${rules[rule - 1] === undefined ? '' : `, ${rules[rule - 1]}`}`;

/** One reason as a sentence in the reader's clock and units. An unknown code is shown as it came, never left out. */
export function reasonText(reason: Reason, formats: Formats): string {
  const fault = sheetFaultCode.safeParse(/^sheet:(.+)$/.exec(reason.code)?.[1]);
  if (fault.success) {
    // A process sheet's fault: the first name says where.
    const [where, ...names] = reason.names;
    return `${where ? `${where}: ` : ''}${sheetFaultText({ code: fault.data, names, figures: reason.minutes }, formats)}`;
  }
  const say = (texts as Partial<Record<string, Say>>)[reason.code];
  const named = reason.names.filter(Boolean).join(', ');
  if (!say)
    return `Not allowed (${[ruleText(reason.rule), reason.code].filter(Boolean).join('; ')})${named ? `: ${named}` : ''}.`;
  const today = formats.today();
  const sentence = say(
    {
      names: (i) => reason.names[i] ?? 'another one',
      at: (i) => {
        const at = reason.at[i];
        if (at === undefined) return 'another time';
        return formats.dayOf(at) === today ? formats.time(at) : formats.dateTime(at);
      },
      minutes: (i) => reason.minutes[i] ?? 0,
      count: reason.names.length,
      rule: reason.rule,
    },
    formats,
  );
  return sentence.charAt(0).toUpperCase() + sentence.slice(1);
}
