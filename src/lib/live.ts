import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { readHealth } from '#contracts/health.ts';
import { liveStream, notice } from '#contracts/live.ts';
import { addressOf, call } from './api.ts';
import { connectionNow, heard } from './connection.ts';
import { keepEventStream, type EventStream } from './event-stream.ts';
import { topicsOf, type Topic } from './query-keys.ts';
import { meQuery } from './session.ts';

/** A tab out of sight lets its stream go after this time: a browser opens only six to one server over HTTP/1.1. */
const hiddenFor = 30_000;
const settle = 1_000;
/** Notices that come together are answered together. */
const gather = 60;

/** Hears of changes in the shop and has what is shown fetched again. Returns the way to stop. */
export function openLive(client: QueryClient, shopId: string): () => void {
  const topics = new Set<Topic>();
  let flushing: ReturnType<typeof setTimeout> | undefined;
  const refetch = (...topic: Topic[]) => void client.invalidateQueries({ queryKey: [shopId, ...topic] });
  const flush = () => {
    flushing = undefined;
    for (const topic of topics) refetch(topic);
    topics.clear();
  };
  const change = (data: string) => {
    const told = notice.safeParse(parsed(data));
    // A kind that this page is too old to know may concern anything.
    if (!told.success) return refetch();
    for (const topic of topicsOf[told.data.kind]) topics.add(topic);
    flushing ??= setTimeout(flush, gather);
  };
  const lost = () => {
    heard(false);
    // Says whether the server is gone or only the stream; `call` tells the banner.
    call(readHealth, {}).catch(() => {});
  };
  // The session has ended, or what one may see has changed: asked anew, and listened again where one still may.
  const bye = () => {
    stream.close(false);
    const ask = () => client.fetchQuery({ ...meQuery, staleTime: 0 });
    quiet(client)
      .then(ask)
      .then((me) => (me ? stream.open() : undefined), lost);
  };
  const stream = keepEventStream(addressOf(liveStream.path, { shopId }), {
    on: { change, gap: () => refetch(), bye },
    onLost: lost,
    onOpen: (wasLost) => {
      heard(true);
      if (wasLost) refetch();
    },
  });
  const unwatch = watchTab(stream);
  return () => {
    unwatch();
    clearTimeout(flushing);
    stream.close(false);
    heard(true);
  };
}

/**
 * When a moment has passed and no write is under way: a new password ends all sessions, and the answer that brings this
 * browser its new one may come after the news of it.
 */
async function quiet(client: QueryClient): Promise<void> {
  await new Promise((resolve) => setTimeout(resolve, settle));
  if (client.isMutating() > 0) await quiet(client);
}

/** Lets the stream go while nobody looks, and hurries where the network is back. */
function watchTab(stream: EventStream): () => void {
  let hiding: ReturnType<typeof setTimeout> | undefined;
  const onVisibility = () => {
    clearTimeout(hiding);
    if (document.hidden) hiding = setTimeout(() => stream.close(true), hiddenFor);
    else if (!stream.isOpen()) stream.open();
  };
  const onOnline = () => {
    if (connectionNow().state !== 'fine' && !document.hidden) stream.open();
  };
  document.addEventListener('visibilitychange', onVisibility);
  addEventListener('online', onOnline);
  return () => {
    clearTimeout(hiding);
    document.removeEventListener('visibilitychange', onVisibility);
    removeEventListener('online', onOnline);
  };
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

/** Once, in the shell: changes of others appear by themselves. */
export function useLive(shopId: string): void {
  const client = useQueryClient();
  useEffect(() => openLive(client, shopId), [client, shopId]);
}
