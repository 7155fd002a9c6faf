import type { DayView, PlanRun } from '#contracts/day.ts';
import { loadAir, type AirOfShop } from '../db/air.ts';
import { dayStages, planHeads, unplacedJobs, type PlanHeads, type ShownPlan } from '../db/day.ts';
import { inShop } from '../db/in-shop.ts';
import { loadResources } from '../db/resources.ts';
import type { Deps } from '../deps.ts';
import { changedAir } from '../planning/air/air-of-plan.ts';
import { gateOf } from '../planning/air/gate.ts';
import { openSpans } from '../planning/calendars.ts';
import { may, type Actor } from '../policies.ts';
import { barsOf } from './day-bars.ts';
import { dayRows } from './day-rows.ts';
import { readRange } from './read-range.ts';

const MOST_DAYS = 35;

/** The booth day in five statements, whatever the size. @throws {Refusal} bad-request for a range that is none. */
export function readDay(
  deps: Deps,
  actor: Actor,
  asked: { from: string; to: string; plan: ShownPlan },
): Promise<DayView> {
  const span = readRange(asked, MOST_DAYS);
  return inShop(deps.db, actor, async (trx) => {
    // The number of the last change is read first: what is seen after it may be newer, never older.
    const now = deps.now();
    const setUp = await loadResources(trx, actor.shopId);
    const heads = await planHeads(trx, actor.shopId);
    const shown = asked.plan === 'draft' && heads.draft !== null ? 'draft' : 'posted';
    const stages = await dayStages(trx, actor.shopId, { ...span, plan: shown });
    const air = await loadAir(trx, actor.shopId);
    const unplaced = await unplacedJobs(trx, actor.shopId, shown);
    const people = new Map(setUp.people.map((person) => [person.id, person.name]));
    const bars = barsOf(stages, span, shown, { person: (id) => people.get(id) ?? null });
    const used = new Set(bars.flatMap((bar) => [bar.placeId, bar.personId ?? '', ...bar.lampIds]));
    return {
      span: { from: span.from.toISOString(), to: span.to.toISOString() },
      serverTime: now.toISOString(),
      seq: setUp.shop.changeSeq,
      shown,
      posted: {
        number: setUp.shop.planNumber,
        at: utc(heads.posted?.at ?? null),
        by: heads.posted?.by ?? null,
        changedAir: changedAir(heads.posted?.air ?? null, air, now, setUp.shop.timeZone),
      },
      draft: draftHead(heads.draft, setUp.shop.planNumber),
      open: openSpans(setUp, span).map(({ from, to }) => ({ from: from.toISOString(), to: to.toISOString() })),
      rows: dayRows(setUp, span, used, may.plan(actor)),
      air: latestAir(air, now),
      circuits: setUp.circuits,
      bars,
      unplaced,
      run: runView(heads.run),
    };
  });
}

const A_DAY = 24 * 3_600_000;

const latestAir = ({ zones, settings }: AirOfShop, now: Date): DayView['air'] =>
  zones.flatMap(({ id, name, latest }) => {
    if (latest === null || now.getTime() - latest.at.getTime() > A_DAY) return [];
    const { celsius, humidity } = latest;
    const gate = gateOf(latest, settings, now);
    return [{ zoneId: id, name, at: latest.at.toISOString(), celsius, humidity, gate }];
  });

const utc = (text: string | null): string | null => (text === null ? null : new Date(text).toISOString());

function draftHead(draft: PlanHeads['draft'], planNumber: number): DayView['draft'] {
  if (draft === null) return null;
  const { planNumber: grewFrom, updatedAt, ...head } = draft;
  return { ...head, updatedAt: new Date(updatedAt).toISOString(), behind: grewFrom !== planNumber };
}

const runView = (run: PlanRun | null): PlanRun | null =>
  run && { ...run, startedAt: utc(run.startedAt), finishedAt: utc(run.finishedAt) };
