import type { BenchStage, BenchView } from '#contracts/bench.ts';
import { loadAir, type AirOfShop } from '../db/air.ts';
import { benchStages, type BenchRow } from '../db/bench.ts';
import { inShop } from '../db/in-shop.ts';
import { loadResources } from '../db/resources.ts';
import type { Deps } from '../deps.ts';
import { notFound, Refusal } from '../errors.ts';
import { sprayAir, sprays } from '../planning/air/spray-air.ts';
import { workingSpans } from '../planning/calendars.ts';
import { localDayOf, spanOfLocalDay } from '../planning/local-time.ts';
import type { Span } from '../planning/spans.ts';
import { windowOf } from '../planning/windows.ts';
import { maySeeBenchOf, type Actor } from '../policies.ts';
import { bookedPhases } from './booked-phases.ts';

type Asked = { day?: string | undefined; personId?: string | undefined };

/**
 * A person's stages of a day of the shop's calendar, today unless said otherwise. An account that is nobody on the
 * roster has an empty bench. @throws {Refusal} forbidden for somebody else's bench, not-found for an unknown person.
 */
export function readBench(deps: Deps, actor: Actor, asked: Asked): Promise<BenchView> {
  const personId = asked.personId ?? actor.personId;
  if (personId !== null && !maySeeBenchOf(actor, personId)) throw new Refusal('forbidden');
  return inShop(deps.db, actor, async (trx) => {
    const now = deps.now();
    const setUp = await loadResources(trx, actor.shopId);
    const today = localDayOf(now, setUp.shop.timeZone);
    const day = asked.day ?? today;
    const head = { serverTime: now.toISOString(), day };
    if (personId === null) return { ...head, person: null, working: [], stages: [] };
    const person = setUp.people.find((candidate) => candidate.id === personId);
    if (!person) throw notFound();
    const span = spanOfLocalDay(day, setUp.shop.timeZone);
    const rows = await benchStages(trx, actor.shopId, { personId, ...span, withOverdue: day === today });
    const air = await loadAir(trx, actor.shopId);
    return {
      ...head,
      person: { id: person.id, name: person.name },
      working: workingSpans(setUp, personId, span).map(iso),
      stages: rows.map((row) => present(row, air, now)),
    };
  });
}

const iso = (span: Span) => ({ from: span.from.toISOString(), to: span.to.toISOString() });

function present(row: BenchRow, air: AirOfShop, now: Date): BenchStage {
  const { way, zoneId, phases, previousState, previousEnd, startedAt, finishedAt, from, to, ...rest } = row;
  const window = windowOf(previousEnd, [way], way.id);
  return {
    ...rest,
    ...iso({ from, to }),
    wayLabel: way.label,
    phases: bookedPhases(from, phases, way).map((phase) => ({ kind: phase.kind, ...iso(phase) })),
    window: { earliest: window.earliest?.toISOString() ?? null, latest: window.latest?.toISOString() ?? null },
    startedAt: startedAt?.toISOString() ?? null,
    finishedAt: finishedAt?.toISOString() ?? null,
    ready: previousState === null || previousState === 'done',
    air: sprays(way) ? sprayAir(air, zoneId, now) : null,
  };
}
