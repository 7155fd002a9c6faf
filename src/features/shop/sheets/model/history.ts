/** What was, is, and was taken back. `tag` names the field of the last change, so that typing is one step and not thirty. */
export type History<T> = { past: readonly T[]; present: T; future: readonly T[]; tag: string | null };

const KEPT = 100;

export const historyOf = <T>(present: T): History<T> => ({ past: [], present, future: [], tag: null });

export function changed<T>(history: History<T>, next: T, tag: string | null = null): History<T> {
  if (next === history.present) return history;
  const goesOn = tag !== null && tag === history.tag && history.past.length > 0;
  const past = goesOn ? history.past : [...history.past, history.present].slice(-KEPT);
  return { past, present: next, future: [], tag };
}

export function undone<T>({ past, present, future }: History<T>): History<T> {
  const before = past.at(-1);
  if (before === undefined) return { past, present, future, tag: null };
  return { past: past.slice(0, -1), present: before, future: [present, ...future], tag: null };
}

export function redone<T>({ past, present, future }: History<T>): History<T> {
  const [next, ...later] = future;
  if (next === undefined) return { past, present, future, tag: null };
  return { past: [...past, present], present: next, future: later, tag: null };
}
