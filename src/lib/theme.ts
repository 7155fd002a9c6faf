import { useSyncExternalStore } from 'react';

export type Theme = 'system' | 'light' | 'dark';
// The same name is read before the first paint, in public/before.js.
const key = 'ovenbird.theme';
const listeners = new Set<() => void>();

/** Chosen here before anything was stored, or where storage is closed to us. */
let chosen: Theme = 'system';

function stored(): Theme {
  try {
    const text = localStorage.getItem(key);
    return text === 'light' || text === 'dark' ? text : 'system';
  } catch {
    return chosen;
  }
}

function apply(): void {
  const isDark = chosen === 'dark' || (chosen === 'system' && matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.dataset['theme'] = isDark ? 'dark' : 'light';
  for (const listener of listeners) listener();
}

export function chooseTheme(theme: Theme): void {
  chosen = theme;
  try {
    if (theme === 'system') localStorage.removeItem(key);
    else localStorage.setItem(key, theme);
  } catch {
    // It then lasts as long as the page.
  }
  apply();
}

/** Follows the system's switch at dusk, and another tab's choice. */
export function watchTheme(): void {
  const follow = () => {
    chosen = stored();
    apply();
  };
  matchMedia('(prefers-color-scheme: dark)').addEventListener('change', follow);
  addEventListener('storage', (event) => {
    if (event.key === key) follow();
  });
  follow();
}

export const useTheme = (): Theme =>
  useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => chosen,
  );
