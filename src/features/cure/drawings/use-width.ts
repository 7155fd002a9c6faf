import { useCallback, useState } from 'react';

/** Width of an element in whole pixels, as it changes; a drawing is made for that width, so that its letters keep their size. */
export function useWidth(atFirst = 640): [ref: (element: Element | null) => (() => void) | undefined, width: number] {
  const [width, setWidth] = useState(atFirst);
  const ref = useCallback((element: Element | null) => {
    if (!element || typeof ResizeObserver === 'undefined') return undefined;
    const observer = new ResizeObserver(([entry]) => {
      const now = Math.floor(entry?.contentRect.width ?? 0);
      if (now > 0) setWidth(now);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
