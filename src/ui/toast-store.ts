import { useSyncExternalStore } from 'react';

export type Toast = {
  id: number;
  text: string;
  tone: 'plain' | 'good' | 'bad';
  /** An act in the toast: it stays at least 10 s then, and the same must be reachable elsewhere. */
  act: { label: string; run: () => void } | null;
};

let toasts: readonly Toast[] = [];
let last = 0;
const listeners = new Set<() => void>();
const set = (next: readonly Toast[]) => {
  toasts = next;
  for (const listener of listeners) listener();
};

/** Tells what just happened, out loud too. For what went wrong use ErrorNote where it happened; this only in passing. */
export function showToast(text: string, more: { tone?: Toast['tone']; act?: Toast['act'] } = {}): number {
  const toast = { id: ++last, text, tone: more.tone ?? 'plain', act: more.act ?? null };
  // Three at most: older ones would push the page's foot out of sight.
  set([...toasts.slice(-2), toast]);
  return toast.id;
}
export const dropToast = (id: number): void => set(toasts.filter((toast) => toast.id !== id));

export const useToasts = (): readonly Toast[] =>
  useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => toasts,
  );
