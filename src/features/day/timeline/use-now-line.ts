import { useEffect, type RefObject } from 'react';
import { fractionAt, type Axis } from '../model/axis.ts';

/**
 * Where now is, as properties of the frame that the stylesheet draws a line from. The calendar library's own line draws
 * every row again each minute; this one moves two properties.
 */
export function useNowLine(
  frame: RefObject<HTMLElement | null>,
  axis: Axis,
  skew: number,
  sayTime: (at: number) => string,
): void {
  useEffect(() => {
    const show = () => {
      const element = frame.current;
      if (!element) return;
      const now = Date.now() + skew;
      const fraction = fractionAt(axis, now);
      element.dataset['now'] = fraction > 0 && fraction < 1 ? 'shown' : 'elsewhere';
      element.style.setProperty('--now', String(fraction));
      element.style.setProperty('--now-text', `"${sayTime(now)}"`);
    };
    show();
    const timer = setInterval(show, 15_000);
    document.addEventListener('visibilitychange', show);
    return () => {
      clearInterval(timer);
      document.removeEventListener('visibilitychange', show);
    };
  }, [frame, axis, skew, sayTime]);
}
