import { prune as pruneRows } from '#server/db/prune.ts';
import type { TaskFunction } from '../task-function.ts';

export const prune: TaskFunction = async (deps) => {
  const forgotten = await pruneRows(deps.db, deps.now());
  deps.log.info(forgotten, 'pruned');
};
