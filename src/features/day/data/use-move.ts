import { useMutation, useQueryClient } from '@tanstack/react-query';
import { moveStage } from '#contracts/drafts.ts';
import type { DayView } from '#contracts/day.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { moveInView, type Move } from '../model/move-in-view.ts';
import { dayKey, dayQuery, type DayAsked } from './day-query.ts';
import { draftToWrite, forgetDraft, sawDraft } from './draft-head.ts';

/**
 * Moves a stage: drawn at once, sent in the order they were made, put back where the server refuses. The draft is
 * opened first where there is none.
 */
export function useMove(asked: DayAsked) {
  const client = useQueryClient();
  const { shopId } = asked;
  const { queryKey } = dayQuery(asked);
  return useMutation({
    mutationKey: ['move-stage', shopId],
    scope: { id: `draft of ${shopId}` },
    mutationFn: async ({ stageId, ...move }: Move) => {
      const { version } = await draftToWrite(client, shopId);
      const reply = await call(moveStage, { params: { shopId, stageId }, body: { ...move, version } });
      sawDraft(client, shopId, reply.draft);
      return reply;
    },
    onMutate: async (move) => {
      await client.cancelQueries({ queryKey });
      const before = client.getQueryData<DayView>(queryKey);
      if (before) client.setQueryData(queryKey, moveInView(before, move));
      return { before };
    },
    onError: (error, _move, context) => {
      if (context?.before) client.setQueryData(queryKey, context.before);
      if (isApiError(error, 'stale', 'not-found')) forgetDraft(client, shopId);
    },
    onSettled: () => {
      // The answer of an earlier move would undo the drawing of a later one that is still on its way.
      const isLast = client.isMutating({ mutationKey: ['move-stage', shopId] }) <= 1;
      return isLast ? client.invalidateQueries({ queryKey: dayKey(shopId) }) : undefined;
    },
  });
}
