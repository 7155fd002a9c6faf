import { v7 as uuid } from 'uuid';
import type { WeekSpan } from '#contracts/hours.ts';
import { weekdays } from '#contracts/recurrence.ts';
import { recordChange } from '../db/changes.ts';
import { countHoursUp, deleteOpenings, insertOpenings, loadOpenings, lockHours, setOpeningRule } from '../db/hours.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { tryAgain } from '../db/try-again.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { localDayOf } from '../planning/local-time.ts';
import { changeWeek, openingWeek } from '../planning/opening-week.ts';
import { tellClashes } from '../planning/posted-clashes.ts';
import type { Actor } from '../policies.ts';

type Input = { version: number; from: string; week: WeekSpan[] };

/**
 * Sets the usual week from a day on, today or later.
 * @throws {Refusal} stale with the hours' version; bad-request where the day is over or hours of a day meet
 */
export function setWeek(deps: Deps, actor: Actor, input: Input) {
  const { shopId } = actor;
  return tryAgain(() =>
    inShop(deps.db, actor, async (trx) => {
      const hours = await lockHours(trx, shopId);
      const today = localDayOf(deps.now(), hours.timeZone);
      const openings = await loadOpenings(trx, shopId);
      if (hours.version !== input.version)
        throw new Refusal('stale', { current: { version: hours.version, ...openingWeek(openings, today) } });
      refuseFaults(input, today);
      const change = changeWeek(openings, input.from, input.week);
      const { clashes } = await tellClashes(trx, shopId, deps.now(), async () => {
        for (const { id, rule } of change.end) await setOpeningRule(trx, shopId, id, rule);
        await deleteOpenings(trx, shopId, change.remove);
        await insertOpenings(
          trx,
          shopId,
          change.add.map((opening) => ({ id: uuid(), ...opening })),
        );
      });
      const version = await countHoursUp(trx, shopId);
      await recordHours(trx, actor, { from: input.from, week: input.week });
      return { version, clashes };
    }),
  );
}

export const recordHours = (trx: Trx, actor: Actor, detail: Record<string, unknown>) =>
  recordChange(trx, actor, { kind: 'shop-changed', ids: [actor.shopId], detail: { openingHours: detail } });

function refuseFaults({ from, week }: Input, today: string): void {
  const fields = [
    ...(from < today ? [{ path: 'body.from', message: 'that day is over; the past stays as it was' }] : []),
    ...week.flatMap((span, i) =>
      week.some((other, j) => j < i && meet(span, other))
        ? [{ path: `body.week.${i}`, message: 'meets other hours of that day' }]
        : [],
    ),
  ];
  if (fields.length > 0) throw new Refusal('bad-request', { fields });
}

/** Hours on a ring of seven days: Sunday night meets Monday morning. */
function meet(a: WeekSpan, b: WeekSpan): boolean {
  const ring = 7 * 1440;
  const start = (span: WeekSpan) => weekdays.indexOf(span.day) * 1440 + span.from;
  const gap = (first: WeekSpan, second: WeekSpan) => (start(second) - start(first) + ring) % ring;
  return gap(a, b) < a.to - a.from || gap(b, a) < b.to - b.from;
}
