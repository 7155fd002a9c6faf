import { useLayoutEffect, useRef, type RefObject } from 'react';
import { NAMES } from './sizes.ts';

/**
 * When the scale changes the time in the middle of the box stays in the middle, or, where `holdAt` was told just before,
 * the time under the pointer under the pointer.
 */
export function useKeepCentre(box: RefObject<HTMLElement | null>, laneWidth: number): (clientX: number) => void {
  /** Share of the drawn time in the middle of the box. */
  const middle = useRef(0.5);
  const held = useRef<{ x: number; share: number } | null>(null);
  useLayoutEffect(() => {
    const element = box.current;
    if (!element) return undefined;
    const half = (element.clientWidth - NAMES) / 2;
    const { x, share } = held.current ?? { x: half, share: middle.current };
    held.current = null;
    element.scrollTo({ left: share * laneWidth - x });
    const remember = () => (middle.current = (element.scrollLeft + half) / laneWidth);
    element.addEventListener('scroll', remember, { passive: true });
    return () => element.removeEventListener('scroll', remember);
  }, [box, laneWidth]);
  return (clientX) => {
    const element = box.current;
    if (!element) return;
    const x = clientX - element.getBoundingClientRect().left - NAMES;
    held.current = { x, share: (element.scrollLeft + x) / laneWidth };
  };
}
