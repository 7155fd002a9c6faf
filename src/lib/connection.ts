import { useSyncExternalStore } from 'react';

/**
 * What we know of the way to the server. `offline`: the last try got no answer, or the device says it has no network.
 * `lagging`: it answers, but changes of others are not heard live.
 */
export type Connection = { state: 'fine' | 'offline' | 'lagging'; since: number };

let answered = true;
let live = true;
let connection: Connection = { state: 'fine', since: Date.now() };
const listeners = new Set<() => void>();

function judge(): void {
  const state = !answered || !navigator.onLine ? 'offline' : live ? 'fine' : 'lagging';
  if (state === connection.state) return;
  connection = { state, since: Date.now() };
  for (const listener of listeners) listener();
}

/** Told by every call: whether any answer came. */
export function reached(didAnswer: boolean): void {
  answered = didAnswer;
  judge();
}
/** Told by the live notices: whether the stream is open. */
export function heard(isLive: boolean): void {
  live = isLive;
  if (isLive) answered = true;
  judge();
}
export const connectionNow = (): Connection => connection;

export function onConnection(listener: () => void): () => void {
  listeners.add(listener);
  return () => listeners.delete(listener);
}

addEventListener('online', () => {
  // The network is back; whether the server is, the next call tells.
  answered = true;
  judge();
});
addEventListener('offline', judge);

export const useConnection = (): Connection => useSyncExternalStore(onConnection, connectionNow);
