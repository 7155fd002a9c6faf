import { lookAtPeople as look } from '#server/services/look-at-people.ts';
import type { TaskFunction } from '../task-function.ts';

export const lookAtPeople: TaskFunction = (deps) => look(deps);
