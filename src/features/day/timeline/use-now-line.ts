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
      if (frame.current) draw(frame.current, fractionAt(axis, Date.now() + skew), sayTime(Date.now() + skew));
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

function draw(frame: HTMLElement, fraction: number, time: string): void {
  frame.dataset['now'] = fraction > 0 && fraction < 1 ? 'shown' : 'elsewhere';
  frame.style.setProperty('--now', String(fraction));
  frame.style.setProperty('--now-text', `"${time}"`);
}
