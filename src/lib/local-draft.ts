import { useEffect, useState } from 'react';

const prefix = 'ovenbird.draft.';

/** What was typed under that name and not sent yet; null where there is nothing usable. */
export function readLocalDraft<T>(name: string, isUsable: (value: unknown) => value is T): T | null {
  try {
    const value: unknown = JSON.parse(sessionStorage.getItem(prefix + name) ?? 'null');
    return isUsable(value) ? value : null;
  } catch {
    return null;
  }
}

export function writeLocalDraft(name: string, value: unknown): void {
  try {
    sessionStorage.setItem(prefix + name, JSON.stringify(value));
  } catch {
    // Full or closed storage: the form works as before, it is only not kept over a reload.
  }
}

export function dropLocalDraft(name: string): void {
  try {
    sessionStorage.removeItem(prefix + name);
  } catch {
    // Nothing was kept there then.
  }
}

/** Everything typed by whoever was signed in; on signing out. */
export function dropAllLocalDrafts(): void {
  try {
    for (const key of Object.keys(sessionStorage)) if (key.startsWith(prefix)) sessionStorage.removeItem(key);
  } catch {
    // Nothing was kept there then.
  }
}

/**
 * A form half filled is still there after a reload. Kept per tab, so that two tabs do not fight. Starts with what was
 * kept or `initial`; `keep` stores shortly after the last change, `drop` when it was sent or let go.
 */
export function useLocalDraft<T>(name: string, initial: T, isUsable: (value: unknown) => value is T) {
  const [start] = useState(() => readLocalDraft(name, isUsable));
  const [value, keep] = useState<T | null>(null);
  useEffect(() => {
    if (value === null) return;
    const timer = setTimeout(() => writeLocalDraft(name, value), 250);
    const now = () => writeLocalDraft(name, value);
    addEventListener('pagehide', now);
    return () => {
      clearTimeout(timer);
      removeEventListener('pagehide', now);
    };
  }, [name, value]);
  const drop = () => {
    keep(null);
    dropLocalDraft(name);
  };
  return { start: start ?? initial, wasKept: start !== null, keep: (next: T) => keep(next), drop };
}
