import { useSyncExternalStore } from 'react';

/** Whether a media query holds, now and as it changes. */
export const useMedia = (query: string): boolean =>
  useSyncExternalStore(
    (listener) => {
      const list = matchMedia(query);
      list.addEventListener('change', listener);
      return () => list.removeEventListener('change', listener);
    },
    () => matchMedia(query).matches,
  );

/** No room for columns: a phone, or a page zoomed to four times its size. */
export const useIsNarrow = (): boolean => useMedia('(max-width: 47.99rem)');
