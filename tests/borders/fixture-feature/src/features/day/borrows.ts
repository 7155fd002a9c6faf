// Must be refused: features never import each other, and the browser no server code.
import { useJobs } from '../jobs/use-jobs.ts';
import { checkPlan } from '#planner/index.ts';

export const seen = [useJobs, checkPlan, () => import('#server/services/post-plan.ts')];
