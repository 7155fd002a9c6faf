import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant } from './common.ts';
import { planRun } from './day.ts';
import { reason } from './reasons.ts';

const seen = z.number().int().min(1);

export const draftHead = z.strictObject({ id, version: z.number().int() });

/** Opens the shop's draft, copied from the posted plan; answers with the open one where there is one already. */
export const openDraft = endpoint({
  name: 'open-draft',
  method: 'POST',
  path: '/api/shops/:shopId/draft',
  params: inShop,
  reply: draftHead,
});
export const dropDraft = endpoint({
  name: 'drop-draft',
  method: 'POST',
  path: '/api/shops/:shopId/draft/drop',
  params: inShop,
  body: z.strictObject({ version: seen }),
});

/**
 * Moves a stage in the open draft; the stages that are done where it leaves the part, and the load it shares, move
 * along. 422 with reasons where a rule would be broken: nothing is written then. 409 where the draft has moved on.
 * `dryRun` asks only.
 */
export const moveStage = endpoint({
  name: 'move-stage',
  method: 'POST',
  path: '/api/shops/:shopId/draft/stages/:stageId/move',
  params: inShop.extend({ stageId: id }),
  body: z.strictObject({
    version: seen,
    start: instant,
    placeId: id,
    /** Absent: whoever has it keeps it if free, otherwise the first who may. */
    personId: id.nullable().optional(),
    /** Absent: the way it has. */
    way: z.string().optional(),
    pinned: z.boolean().optional(),
    dryRun: z.boolean().optional(),
  }),
  reply: z.strictObject({
    draft: draftHead,
    /** Rules that held before and are broken now: empty unless `dryRun`. */
    reasons: z.array(reason),
    moved: z.array(z.strictObject({ stageId: id, from: instant, to: instant, placeId: id, personId: id.nullable() })),
  }),
});

const spot = z.strictObject({ placeName: z.string(), personName: z.string().nullable(), from: instant, to: instant });
const jobRef = { jobId: id, jobNumber: z.number().int(), jobTitle: z.string() };
export const comparison = z.strictObject({
  draft: draftHead,
  postedNumber: z.number().int(),
  moved: z.array(
    z.strictObject({ ...jobRef, stageId: id, stageTitle: z.string(), before: spot.nullable(), after: spot.nullable() }),
  ),
  /** Promises kept by the posted plan and missed by the draft, and the other way round. */
  newlyLate: z.array(z.strictObject({ ...jobRef, promiseAt: instant, endsAt: instant })),
  saved: z.array(z.strictObject({ ...jobRef, promiseAt: instant, endsAt: instant })),
  /** Who gets a letter when it is posted. */
  told: z.array(z.string()),
  /** Broken rules among what has already happened cannot be mended; others block posting. */
  reasons: z.array(reason),
});
export type Comparison = z.output<typeof comparison>;
export const compareDraft = endpoint({
  name: 'compare-draft',
  method: 'GET',
  path: '/api/shops/:shopId/draft/compare',
  params: inShop,
  reply: comparison,
});

export const postDraft = endpoint({
  name: 'post-draft',
  method: 'POST',
  path: '/api/shops/:shopId/draft/post',
  params: inShop,
  body: z.strictObject({ version: seen }),
  reply: z.strictObject({ planNumber: z.number().int(), changed: z.number().int(), letters: z.number().int() }),
});

export const startPlanRun = endpoint({
  name: 'start-plan-run',
  method: 'POST',
  path: '/api/shops/:shopId/plan-runs',
  params: inShop,
  body: z.strictObject({
    id,
    scope: z.enum(['all', 'rest']),
    seconds: z.number().int().min(1).max(120).default(5),
    seed: z.number().int().min(1).max(2_147_483_647).default(1),
  }),
  reply: planRun,
});
const inRun = inShop.extend({ runId: id });
export const readPlanRun = endpoint({
  name: 'read-plan-run',
  method: 'GET',
  path: '/api/shops/:shopId/plan-runs/:runId',
  params: inRun,
  reply: planRun,
});
export const stopPlanRun = endpoint({
  name: 'stop-plan-run',
  method: 'POST',
  path: '/api/shops/:shopId/plan-runs/:runId/stop',
  params: inRun,
  reply: planRun,
});
