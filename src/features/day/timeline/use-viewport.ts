import { useLayoutEffect, useState, type RefObject } from 'react';

/** What is to be drawn of a scrolled box, in pixels of its contents; `width` is that of the box. */
export type Viewport = { width: number; top: number; bottom: number; left: number; right: number };

/** How far beyond the edges things are drawn, and in which steps it is looked at: one drawing serves many scrolls. */
const BEYOND = 240;
const STEP = 120;

const nothing: Viewport = { width: 0, top: 0, bottom: Infinity, left: 0, right: Infinity };

function viewportOf(box: HTMLElement): Viewport {
  const { clientWidth, clientHeight, scrollLeft, scrollTop } = box;
  // A box without a size (not laid out) shows everything.
  if (clientHeight === 0) return { ...nothing, width: clientWidth };
  const down = (value: number) => Math.floor((value - BEYOND) / STEP) * STEP;
  const up = (value: number) => Math.ceil((value + BEYOND) / STEP) * STEP;
  return {
    width: clientWidth,
    top: down(scrollTop),
    bottom: up(scrollTop + clientHeight),
    left: down(scrollLeft),
    right: up(scrollLeft + clientWidth),
  };
}

const same = (a: Viewport, b: Viewport): boolean =>
  a.width === b.width && a.top === b.top && a.bottom === b.bottom && a.left === b.left && a.right === b.right;

/** The part of a scrolled box that is worth drawing. Changes only when scrolling or resizing asks for other things. */
export function useViewport(box: RefObject<HTMLElement | null>): Viewport {
  const [viewport, setViewport] = useState(nothing);
  useLayoutEffect(() => {
    const element = box.current;
    if (!element) return undefined;
    const look = () =>
      setViewport((before) => {
        const now = viewportOf(element);
        return same(before, now) ? before : now;
      });
    look();
    element.addEventListener('scroll', look, { passive: true });
    const observer = new ResizeObserver(look);
    observer.observe(element);
    return () => {
      element.removeEventListener('scroll', look);
      observer.disconnect();
    };
  }, [box]);
  return viewport;
}
