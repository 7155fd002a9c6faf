// Must be refused: chemistry stands on its own.
import { checkPlan } from '../planner/check-plan.ts';

export const seen = checkPlan;
