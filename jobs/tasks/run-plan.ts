import * as z from 'zod';
import type { PlannerThreads } from '#server/planning/planner-threads.ts';
import { failPlanRun, runPlan } from '#server/services/run-plan.ts';
import { shopOf, type TaskDefinition } from '../task-function.ts';

const payload = z.object({ runId: z.uuid() });

/** A run of the planner. After a crash another worker begins it anew; the draft stays whole until then. */
export const planWith = (threads: PlannerThreads): TaskDefinition => ({
  attempts: 3,
  run: (deps, task, signal) =>
    runPlan(deps, threads, { shopId: shopOf(task), runId: payload.parse(task.payload).runId }, signal),
  onDead: (deps, task) =>
    failPlanRun(
      deps,
      { shopId: shopOf(task), runId: payload.parse(task.payload).runId },
      'The planner could not finish. Nothing was changed. Start it again.',
    ),
});
