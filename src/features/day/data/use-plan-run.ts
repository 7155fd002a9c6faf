import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { v7 } from 'uuid';
import type { DayView, PlanRun } from '#contracts/day.ts';
import { readPlanRun, startPlanRun, stopPlanRun } from '#contracts/drafts.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { dayKey } from './day-query.ts';
import { forgetDraft } from './draft-head.ts';

/** Seconds of search: long enough to be good, short enough to be waited for. It can be stopped at any time. */
const seconds = 10;

export const isActive = (run: PlanRun | null | undefined): run is PlanRun =>
  run?.state === 'queued' || run?.state === 'running';

export type Planning = {
  /** The run that goes on, or the last one begun or stopped here. */
  run: PlanRun | null;
  start: (scope: PlanRun['scope']) => void;
  stop: () => void;
  starting: boolean;
  stopping: boolean;
  error: unknown;
};

/** Runs of the planner: started here or by somebody else, followed until they end, their plan fetched as the draft. */
export function usePlanRun(shopId: string, view: DayView | undefined): Planning {
  const client = useQueryClient();
  const [begun, setBegun] = useState<string | null>(null);
  const id = isActive(view?.run) ? view.run.id : begun;
  const followed = useQuery({
    queryKey: shopKey(shopId, 'plan-run', id),
    queryFn: ({ signal }) => call(readPlanRun, { params: { shopId, runId: id ?? '' }, signal }),
    enabled: id !== null,
    refetchInterval: (query) => (isActive(query.state.data) ? 700 : false),
  });
  const remember = (run: PlanRun) => {
    setBegun(run.id);
    client.setQueryData(shopKey(shopId, 'plan-run', run.id), run);
  };
  const start = useMutation({
    mutationFn: (scope: PlanRun['scope']) =>
      call(startPlanRun, { params: { shopId }, body: { id: v7(), scope, seconds } }),
    onSuccess: remember,
  });
  const stop = useMutation({
    mutationFn: (runId: string) => call(stopPlanRun, { params: { shopId, runId } }),
    onSuccess: remember,
  });
  const state = followed.data?.state;
  useEffect(() => {
    if (state !== 'done' && state !== 'stopped') return;
    // The plan replaced the draft: its version is another one.
    forgetDraft(client, shopId);
    void client.invalidateQueries({ queryKey: dayKey(shopId) });
  }, [client, shopId, state, id]);
  return {
    run: followed.data ?? view?.run ?? null,
    start: start.mutate,
    stop: () => {
      if (id !== null) stop.mutate(id);
    },
    starting: start.isPending,
    stopping: stop.isPending,
    error: start.error ?? stop.error ?? null,
  };
}
