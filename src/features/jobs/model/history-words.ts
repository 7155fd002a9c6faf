import type { Job } from '#contracts/jobs.ts';
import { differences, type Say } from './field-words.ts';

type Line = Pick<Job['history'][number], 'kind' | 'detail'>;

/** A line of a job's history as sentences; the first says what happened, the rest what exactly. Null: not for people. */
export function historyWords({ kind, detail }: Line, say: Say): string[] | null {
  switch (kind) {
    case 'job-created':
      return ['Made the job'];
    case 'job-changed':
      return changeWords(detail, say);
    case 'job-withdrawn':
      return ['Withdrew the job', bookingsWords(detail['bookings'])].filter((said) => said !== '');
    case 'stage-started':
      return [`Started ${stageNames(detail)}`, overruledWords(detail['overruled'])].filter((said) => said !== '');
    case 'trace-attached':
      return [`Attached a bake trace to ${stageNames(detail)}`, text(detail['fileName'])];
    case 'trace-removed':
      return [`Took a bake trace off ${stageNames(detail)}`, text(detail['fileName'])];
    case 'stage-finished':
      return [`Finished ${stageNames(detail)}`];
    case 'plan-posted':
      return ['Posted a plan that moves this job'];
    default:
      return null;
  }
}

function changeWords(detail: Line['detail'], say: Say): string[] {
  const found = differences(record(detail['before']), record(detail['after']), say);
  const [only] = found;
  if (!only) return ['Changed the job'];
  if (found.length === 1) return [`Changed the ${only.label}`, `From ${only.from} to ${only.to}`];
  return [
    `Changed the ${list(found.map((each) => each.label))}`,
    ...found.map(({ label, from, to }) => `${capital(label)}: from ${from} to ${to}`),
  ];
}

const text = (value: unknown): string => (typeof value === 'string' ? value : '');

/** Why it was begun although a gate was shut. */
const overruledWords = (overruled: unknown): string => {
  const reason = record(overruled)['reason'];
  return typeof reason === 'string' ? `Under the dew-point gate, all the same: ${reason}` : '';
};

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

const record = (value: unknown): Record<string, unknown> =>
  typeof value === 'object' && value !== null ? { ...value } : {};

function stageNames(detail: Line['detail']): string {
  const stages = Array.isArray(detail['stages']) ? detail['stages'].filter((s) => typeof s === 'string') : [];
  return stages.length > 0 ? list(stages) : 'a stage';
}

function bookingsWords(bookings: unknown): string {
  const count = Array.isArray(bookings) ? bookings.length : typeof bookings === 'number' ? bookings : 0;
  return count === 0 ? '' : `${count === 1 ? '1 booking' : `${count} bookings`} fell free`;
}

/** `a`, `a and b`, `a, b and c` */
export function list(words: readonly string[]): string {
  const last = words.at(-1) ?? '';
  return words.length < 2 ? last : `${words.slice(0, -1).join(', ')} and ${last}`;
}
