// Kept as a bad example: what is said of a process sheet follows from it and the data sheets, not from a plan, nor by a package.
import { checkPlan } from '#planner/check-plan.ts';
import { v7 } from 'uuid';

export const fault = [checkPlan, v7];
