import type { RefObject } from 'react';
import { NAMES } from './sizes.ts';

type Point = { clientX: number; clientY: number };
/** Pixels from an edge within which a dragged bar pulls the box along, and the most pixels a frame. */
const NEAR = 44;
const FASTEST = 14;

const pull = (before: number, after: number): number => {
  const near = (room: number) => (room < NEAR ? Math.ceil(((NEAR - Math.max(room, 0)) / NEAR) * FASTEST) : 0);
  return near(after) - near(before);
};

/** Scrolls while the pointer is near an edge, frame by frame until `pointer` says null. */
export function edgePull(
  box: RefObject<HTMLElement | null>,
  header: number,
  pointer: () => Point | null,
  onScrolled: () => void,
): void {
  const frame = () => {
    const at = pointer();
    const element = box.current;
    if (!at || !element) return;
    const edge = element.getBoundingClientRect();
    const x = pull(at.clientX - edge.left - NAMES, edge.right - at.clientX);
    const y = pull(at.clientY - edge.top - header, edge.bottom - at.clientY);
    const [left, top] = [element.scrollLeft, element.scrollTop];
    element.scrollBy(x, y);
    if (element.scrollLeft !== left || element.scrollTop !== top) onScrolled();
    requestAnimationFrame(frame);
  };
  requestAnimationFrame(frame);
}
