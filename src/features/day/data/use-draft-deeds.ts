import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { compareDraft, dropDraft, postDraft } from '#contracts/drafts.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { dayKey } from './day-query.ts';
import { forgetDraft } from './draft-head.ts';

/** What the draft would change, asked for while somebody looks; asked again whenever the draft changes. */
export const useComparison = (shopId: string, draft: { id: string; version: number }, looking: boolean) =>
  useQuery({
    queryKey: shopKey(shopId, 'draft', 'compare', draft.id, draft.version),
    queryFn: ({ signal }) => call(compareDraft, { params: { shopId }, signal }),
    enabled: looking,
    placeholderData: (before) => before,
  });

/** Ends of a draft: posted or dropped. Whatever comes of it, the board is fetched again. */
export function useDraftEnd(shopId: string) {
  const client = useQueryClient();
  const onSettled = () => {
    forgetDraft(client, shopId);
    return client.invalidateQueries({ queryKey: dayKey(shopId) });
  };
  const post = useMutation({
    mutationFn: (version: number) => call(postDraft, { params: { shopId }, body: { version } }),
    onSettled,
  });
  const drop = useMutation({
    mutationFn: (version: number) => call(dropDraft, { params: { shopId }, body: { version } }),
    onSettled,
  });
  return { post, drop };
}
