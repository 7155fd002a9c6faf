import type * as z from 'zod';
import type { PlaceUse, readUse as contract } from '#contracts/use.ts';
import { inShop } from '../db/in-shop.ts';
import { loadResources, type Resources } from '../db/resources.ts';
import { bookingsForUse, type UseRow } from '../db/use.ts';
import type { Deps } from '../deps.ts';
import { closedSpans, openSpans, workingSpans } from '../planning/calendars.ts';
import { clipSpan, subtractSpans, type Span } from '../planning/spans.ts';
import type { Actor } from '../policies.ts';
import { bookedPhases } from './booked-phases.ts';
import { tally, usedSpans, type Use } from './booth-use.ts';
import { readRange } from './read-range.ts';

const MOST_DAYS = 400;
type Report = z.output<typeof contract.reply>;

/** What every booth, prep station and rack did in a range. @throws {Refusal} bad-request for a range that is none. */
export function readUse(deps: Deps, actor: Actor, asked: { from: string; to: string }): Promise<Report> {
  const range = readRange(asked, MOST_DAYS);
  return inShop(deps.db, actor, async (trx) => {
    const now = deps.now();
    const setUp = await loadResources(trx, actor.shopId);
    const rows = await bookingsForUse(trx, actor.shopId, { ...range, now });
    const open = openSpans(setUp, range);
    const shifts = shiftsOf(setUp, rows);
    const uses = rows.map((row) => ({ row, used: usedSpans(useOf(row, shifts), now) }));
    const places = setUp.places.flatMap((place) => {
      const here = uses.filter(({ row, used }) => row.placeId === place.id && touches(used, range));
      if (place.retired && here.length === 0) return [];
      return {
        placeId: place.id,
        name: place.name,
        kind: place.kind,
        ...tally(
          here.flatMap(({ used }) => used),
          subtractSpans(open, closedSpans(setUp, { placeId: place.id }, range)),
          range,
        ),
        bookings: here.length,
        recorded: here.filter(({ row }) => row.startedAt !== null).length,
      } satisfies PlaceUse;
    });
    return { from: range.from.toISOString(), to: range.to.toISOString(), serverTime: now.toISOString(), places };
  });
}

const touches = (spans: Span[], range: Span): boolean => spans.some((span) => clipSpan(span, range) !== null);

type Shifts = (personId: string) => Span[];

/** Everybody's shifts over all the bookings, worked out once a person. */
function shiftsOf(setUp: Resources, rows: UseRow[]): Shifts {
  const known = new Map<string, Span[]>();
  const ends = rows.flatMap((row) => [row.from, row.to, row.startedAt ?? row.from, row.finishedAt ?? row.to]);
  const all = {
    from: new Date(ends.reduce((least, end) => Math.min(least, end.getTime()), Infinity)),
    to: new Date(ends.reduce((most, end) => Math.max(most, end.getTime()), -Infinity)),
  };
  return (personId) => {
    const spans = known.get(personId) ?? workingSpans(setUp, personId, all);
    known.set(personId, spans);
    return spans;
  };
}

const useOf = (row: UseRow, shifts: Shifts): Use => ({
  from: row.from,
  to: row.to,
  startedAt: row.startedAt,
  finishedAt: row.finishedAt,
  phases: bookedPhases(row.from, row.phases, row.way).map(({ kind, from, to, attendance }) => ({
    kind,
    from,
    to,
    hands: attendance === 'hands',
  })),
  shifts: row.way.split && row.personId !== null ? shifts(row.personId) : null,
  next: row.next && { ...row.next, startsAt: new Date(row.next.startsAt) },
});
