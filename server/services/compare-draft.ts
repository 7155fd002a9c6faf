import type { Comparison } from '#contracts/drafts.ts';
import type { Booked } from '../db/bookings.ts';
import { inShop } from '../db/in-shop.ts';
import type { OpenJob } from '../db/open-jobs.ts';
import { accountsOfPeople } from '../db/people-told.ts';
import type { Deps } from '../deps.ts';
import { notFound } from '../errors.ts';
import { loadFacts, standingOf, type Facts } from '../planning/facts.ts';
import { judgeForPosting } from '../planning/judge-for-posting.ts';
import { changesByPerson, endOfJob, planChanges } from '../planning/plan-changes.ts';
import { namesOf, toReasons } from '../planning/reasons.ts';
import type { Actor } from '../policies.ts';

/** The draft beside the posted plan: what moves, which promises it misses or saves, who is told, and what forbids posting. */
export function compareDraft(deps: Deps, actor: Actor): Promise<Comparison> {
  return inShop(deps.db, actor, async (trx) => {
    const facts = await loadFacts(trx, actor.shopId, deps.now());
    if (facts.draft === null) throw notFound();
    const changes = planChanges(facts);
    const told = await accountsOfPeople(trx, actor.shopId, [...changesByPerson(changes).keys()]);
    const judged = judgeForPosting(facts);
    const names = namesOf(facts);
    const spot = (booked: Booked | null) =>
      booked && {
        placeName: names.get(booked.placeId) ?? '',
        personName: booked.personId === null ? null : (names.get(booked.personId) ?? null),
        from: booked.from.toISOString(),
        to: booked.to.toISOString(),
      };
    return {
      draft: { id: facts.draft.id, version: facts.draft.version },
      postedNumber: facts.resources.shop.planNumber,
      moved: changes.map(({ job, stage, before, after }) => ({
        ...jobRef(job),
        stageId: stage.id,
        stageTitle: stage.title,
        before: spot(before),
        after: spot(after),
      })),
      ...promises(facts),
      told: [...new Set(told.map(({ personName }) => personName))],
      reasons: toReasons(facts, judged.built, judged.verdict.violations),
    };
  });
}

const jobRef = (job: OpenJob) => ({ jobId: job.id, jobNumber: job.number, jobTitle: job.title });

/** A promise counts where both plans know when the job ends. */
function promises(facts: Facts): Pick<Comparison, 'newlyLate' | 'saved'> {
  const newlyLate: Comparison['newlyLate'] = [];
  const saved: Comparison['saved'] = [];
  for (const job of facts.jobs) {
    const after = endOfJob(job, (stage) => standingOf(facts, stage));
    const before = endOfJob(job, (stage) => facts.bookings.get(stage.id) ?? null);
    if (!job.promiseAt || !after || !before) continue;
    const entry = { ...jobRef(job), promiseAt: job.promiseAt.toISOString(), endsAt: after.toISOString() };
    if (after > job.promiseAt && before <= job.promiseAt) newlyLate.push(entry);
    if (after <= job.promiseAt && before > job.promiseAt) saved.push(entry);
  }
  return { newlyLate, saved };
}
