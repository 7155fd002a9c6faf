import { Refusal } from '../errors.ts';
import type { Span } from '../planning/spans.ts';

const DAY = 24 * 60 * 60_000;

/** A range from a query. @throws {Refusal} bad-request where it is empty, turned round or longer than `mostDays`. */
export function readRange(asked: { from: string; to: string }, mostDays: number): Span {
  const range = { from: new Date(asked.from), to: new Date(asked.to) };
  const message =
    range.to <= range.from
      ? 'ends before it begins'
      : range.to.getTime() - range.from.getTime() > mostDays * DAY
        ? `longer than ${mostDays} days`
        : null;
  if (message !== null) throw new Refusal('bad-request', { fields: [{ path: 'query.to', message }] });
  return range;
}
