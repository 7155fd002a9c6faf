import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { readHealth } from '#contracts/health.ts';
import { liveStream, notice } from '#contracts/live.ts';
import { addressOf, call } from './api.ts';
import { connectionNow, heard } from './connection.ts';
import { topicsOf, type Topic } from './query-keys.ts';
import { meQuery } from './session.ts';

/** A stream that breaks and is back within this time was never gone. */
const grace = 2_500;
/** A tab out of sight lets its stream go after this time: a browser opens only six to one server over HTTP/1.1. */
const hiddenFor = 30_000;
/** Notices that come together are answered together. */
const gather = 60;

/** Hears of changes in the shop and has what is shown fetched again. Returns the way to stop. */
export function openLive(client: QueryClient, shopId: string): () => void {
  const topics = new Set<Topic>();
  let source: EventSource | null = null;
  let timers: { flush?: Timer; lost?: Timer; again?: Timer; hide?: Timer } = {};
  let wasLost = false;
  let tries = 0;

  const refetch = (topic?: Topic) =>
    void client.invalidateQueries({ queryKey: topic === undefined ? [shopId] : [shopId, topic] });
  const flush = () => {
    delete timers.flush;
    for (const topic of topics) refetch(topic);
    topics.clear();
  };
  const lost = () => {
    wasLost = true;
    heard(false);
    // Says whether the server is gone or only the stream; `call` tells the banner.
    call(readHealth, {}).catch(() => {});
  };

  const open = () => {
    source?.close();
    source = new EventSource(addressOf(liveStream.path, { shopId }));
    source.addEventListener('open', () => {
      clearTimeout(timers.lost);
      delete timers.lost;
      tries = 0;
      heard(true);
      if (wasLost) refetch();
      wasLost = false;
    });
    source.addEventListener('change', (event: MessageEvent<string>) => {
      const told = notice.safeParse(parsed(event.data));
      // A kind that this page is too old to know may concern anything.
      if (!told.success) return refetch();
      for (const topic of topicsOf[told.data.kind]) topics.add(topic);
      timers.flush ??= setTimeout(flush, gather);
    });
    source.addEventListener('gap', () => refetch());
    // The session has ended, or what one may see has changed: asked anew, and listened again where one still may.
    source.addEventListener('bye', () => {
      source?.close();
      client.fetchQuery({ ...meQuery, staleTime: 0 }).then((me) => (me ? open() : undefined), lost);
    });
    source.addEventListener('error', () => {
      timers.lost ??= setTimeout(lost, grace);
      // Closed for good by an answer that is no stream: asked again, each time later.
      if (source?.readyState === EventSource.CLOSED) {
        clearTimeout(timers.again);
        timers.again = setTimeout(open, Math.min(30_000, 2_000 * 2 ** tries++));
      }
    });
  };

  const close = () => {
    source?.close();
    source = null;
    for (const timer of Object.values(timers)) clearTimeout(timer);
    timers = {};
  };
  const onVisibility = () => {
    if (document.hidden) {
      timers.hide ??= setTimeout(close, hiddenFor);
      return;
    }
    clearTimeout(timers.hide);
    delete timers.hide;
    if (source) return;
    wasLost = true;
    open();
  };
  const onOnline = () => {
    if (connectionNow().state !== 'fine' || source?.readyState === EventSource.CLOSED) open();
  };

  document.addEventListener('visibilitychange', onVisibility);
  addEventListener('online', onOnline);
  open();
  return () => {
    document.removeEventListener('visibilitychange', onVisibility);
    removeEventListener('online', onOnline);
    close();
    heard(true);
  };
}

type Timer = ReturnType<typeof setTimeout>;

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
