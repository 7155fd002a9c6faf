import { useEffect, useSyncExternalStore } from 'react';

export type KeyHelp = { keys: string; does: string };
type Group = { title: string; keys: readonly KeyHelp[] };

let groups: readonly Group[] = [];
const listeners = new Set<() => void>();
const set = (next: readonly Group[]) => {
  groups = next;
  for (const listener of listeners) listener();
};

/** Puts a page's keys on the list that `?` opens, for as long as the page is shown. `keys` must be a constant. */
export function useKeyHelp(title: string, keys: readonly KeyHelp[]): void {
  useEffect(() => {
    const group = { title, keys };
    set([...groups, group]);
    return () => set(groups.filter((other) => other !== group));
  }, [title, keys]);
}

export const useKeyGroups = (): readonly Group[] =>
  useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => groups,
  );

/** True where a key belongs to what is being typed in. */
export const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || target.matches('textarea, select, input:not([type=checkbox], [type=radio])'));
