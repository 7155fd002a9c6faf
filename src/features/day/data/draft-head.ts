import type { QueryClient } from '@tanstack/react-query';
import { openDraft } from '#contracts/drafts.ts';
import { call } from '#src/lib/api.ts';

export type DraftHead = { id: string; version: number };

const key = (shopId: string) => ['draft-head', shopId] as const;

/** The newest version of the draft that this tab has seen, in whatever answer; null where there is none. */
export const draftHead = (client: QueryClient, shopId: string): DraftHead | null =>
  client.getQueryData<DraftHead | null>(key(shopId)) ?? null;

/** Answers may overtake each other: of one draft the higher version stands. */
export function sawDraft(client: QueryClient, shopId: string, seen: DraftHead | null): void {
  const known = draftHead(client, shopId);
  if (known && seen && known.id === seen.id && known.version >= seen.version) return;
  client.setQueryData(key(shopId), seen && { id: seen.id, version: seen.version });
}

/** The draft to write to: the one there is, or a new one copied from the posted plan. @throws {ApiError} */
export async function draftToWrite(client: QueryClient, shopId: string): Promise<DraftHead> {
  const known = draftHead(client, shopId);
  if (known) return known;
  const opened = await call(openDraft, { params: { shopId } });
  sawDraft(client, shopId, opened);
  return opened;
}

/** After somebody else posted or dropped it, or changed it: what was known of it no longer counts. */
export const forgetDraft = (client: QueryClient, shopId: string): void => void client.setQueryData(key(shopId), null);
