import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useEffect, useSyncExternalStore } from 'react';
import { v7 } from 'uuid';
import * as z from 'zod';
import { finishStage, startStage, type BenchStage } from '#contracts/bench.ts';
import { isApiError } from '#src/lib/api-error.ts';
import { call } from '#src/lib/api.ts';
import { onConnection } from '#src/lib/connection.ts';
import { useMe, useShop } from '#src/lib/session.ts';
import { tapQueue, type Refused, type Tap, type TapQueue } from '../model/tap-queue.ts';
import { benchKey } from './bench-queries.ts';

const kept = z.array(
  z.object({
    key: z.string(),
    stageId: z.string(),
    deed: z.enum(['start', 'finish']),
    version: z.number(),
    at: z.string(),
    words: z.string(),
    overrule: z.string().optional(),
  }),
);

// Kept beyond the page: a tap goes on being sent while one looks at something else.
const queues = new Map<string, TapQueue>();

function queueOf(client: QueryClient, accountId: string, shopId: string): TapQueue {
  const store = `ovenbird.taps.${accountId}.${shopId}`;
  const known = queues.get(store);
  if (known) return known;
  const made = tapQueue({
    load: () => loadTaps(store),
    save: (taps) => saveTaps(store, taps),
    send: ({ stageId, deed, version, key, overrule }) =>
      deed === 'start'
        ? call(startStage, { params: { shopId, stageId }, body: { version, overrule }, key })
        : call(finishStage, { params: { shopId, stageId }, body: { version }, key }),
    judge,
    rest: (tries) => backOnline(Math.min(15_000, 1_000 * 2 ** tries)),
    settle: () => client.invalidateQueries({ queryKey: benchKey(shopId) }),
  });
  queues.set(store, made);
  return made;
}

function judge(error: unknown): 'again' | 'later' | 'refused' {
  if (isApiError(error, 'not-signed-in')) return 'later';
  return isApiError(error, 'unreachable', 'unreadable', 'unavailable', 'too-many') ? 'again' : 'refused';
}

/** Taps of this account in this shop, kept on the device until the server has answered. */
export function useTaps() {
  const client = useQueryClient();
  const queue = queueOf(client, useMe().account.id, useShop().id);
  useEffect(() => void queue.run(), [queue]);
  const state = useSyncExternalStore(queue.listen, queue.read);
  const tap = (stage: BenchStage, deed: Tap['deed'], at: number) =>
    void queue.add({
      key: v7(),
      stageId: stage.id,
      deed,
      version: stage.version,
      at: new Date(at).toISOString(),
      words: `${stage.jobNumber} ${stage.title}`,
    });
  /** The tap that was refused, again, with the reason for which a gate is passed over. */
  const overrule = ({ tap: refused }: Refused, reason: string) =>
    void queue.add({ ...refused, key: v7(), at: new Date().toISOString(), overrule: reason });
  return { ...state, tap, overrule, forgive: queue.forgive };
}

function loadTaps(store: string): Tap[] {
  try {
    const parsed = kept.safeParse(JSON.parse(localStorage.getItem(store) ?? '[]'));
    return parsed.success ? parsed.data : [];
  } catch {
    return [];
  }
}

function saveTaps(store: string, taps: readonly Tap[]): void {
  try {
    if (taps.length === 0) localStorage.removeItem(store);
    else localStorage.setItem(store, JSON.stringify(taps));
  } catch {
    // Storage is full or closed: the taps are then kept as long as the page.
  }
}

/** After that time, or as soon as something is known to have changed about the connection. */
function backOnline(ms: number): Promise<void> {
  return new Promise((resolve) => {
    const go = () => {
      clearTimeout(timer);
      stop();
      removeEventListener('online', go);
      resolve();
    };
    const timer = setTimeout(go, ms);
    const stop = onConnection(go);
    addEventListener('online', go);
  });
}
