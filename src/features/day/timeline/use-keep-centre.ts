import { useLayoutEffect, useRef, type RefObject } from 'react';
import type { Zoom } from './scale.ts';

/** Keeps the time in the middle of the page in the middle when the scale changes. */
export function useKeepCentre(frame: RefObject<HTMLElement | null>, zoom: Zoom): void {
  const centre = useRef(0.5);
  useLayoutEffect(() => {
    const scroller = frame.current?.querySelector('.fc-timeline-body')?.closest('.fc-scroller');
    if (!scroller) return undefined;
    const settle = requestAnimationFrame(() => {
      scroller.scrollLeft = centre.current * scroller.scrollWidth - scroller.clientWidth / 2;
    });
    const remember = () => {
      centre.current = (scroller.scrollLeft + scroller.clientWidth / 2) / scroller.scrollWidth;
    };
    scroller.addEventListener('scroll', remember, { passive: true });
    return () => {
      cancelAnimationFrame(settle);
      scroller.removeEventListener('scroll', remember);
    };
  }, [frame, zoom]);
}
