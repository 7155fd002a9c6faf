import { useEffect, useRef, type RefObject } from 'react';
import { aim, drop, laneX, lift, type Grip, type Point, type Scene } from './drag-hands.ts';
import { mayMove } from './may-move.ts';

/** A mouse drags after so many pixels; a finger after so long without moving, so that it may still scroll. */
const MOUSE_PIXELS = 4;
const HOLD_MILLISECONDS = 400;
const FINGER_PIXELS = 10;

const pointOf = ({ clientX, clientY }: Point): Point => ({ clientX, clientY });

/** Dragging a bar in time and from place to place with mouse, pen or finger. Escape, or a lost pointer, puts it back. */
export function useDrag(box: RefObject<HTMLElement | null>, scene: Scene): void {
  const latest = useRef(scene);
  useEffect(() => {
    latest.current = scene;
  });
  useEffect(() => {
    const element = box.current;
    if (!element) return undefined;
    const hands = makeHands(box, () => latest.current);
    const off = new AbortController();
    const { signal } = off;
    element.addEventListener('pointerdown', hands.take, { signal });
    element.addEventListener('pointermove', hands.move, { signal });
    element.addEventListener('pointerup', hands.release, { signal });
    element.addEventListener('pointercancel', hands.putBack, { signal });
    element.addEventListener('click', hands.click, { signal, capture: true });
    // A finger that has taken a bar no longer scrolls; only a listener that is not passive may say so.
    element.addEventListener('touchmove', hands.touch, { signal, passive: false });
    window.addEventListener('keydown', (event) => event.key === 'Escape' && hands.putBack(), { signal });
    return () => {
      off.abort();
      hands.putBack();
    };
  }, [box]);
}

function makeHands(box: RefObject<HTMLElement | null>, scene: () => Scene) {
  let held: Grip | null = null;
  let timer = 0;
  let justDropped = false;
  const begin = (grip: Grip) => lift(box, scene, grip, () => held === grip);
  const letGo = () => {
    clearTimeout(timer);
    held = null;
  };
  const putBack = () => {
    letGo();
    if (scene().store.get().dragged) scene().store.set({ dragged: null });
  };
  const take = (event: PointerEvent) => {
    justDropped = false;
    const id = (event.target as HTMLElement).closest<HTMLElement>('[data-bar]')?.dataset['bar'];
    const item = scene().board.find((one) => one.id === id);
    if (!item || event.button !== 0 || !scene().movable || !mayMove(item)) return;
    const from = pointOf(event);
    const grip: Grip = { item, pointer: event.pointerId, from, laneX: laneX(box, from), last: from, dragging: false };
    held = grip;
    if (event.pointerType !== 'mouse') timer = window.setTimeout(() => held === grip && begin(grip), HOLD_MILLISECONDS);
  };
  const move = (event: PointerEvent) => {
    if (held?.pointer !== event.pointerId) return;
    held.last = pointOf(event);
    if (held.dragging) return aim(box, scene(), held);
    const far = Math.hypot(held.last.clientX - held.from.clientX, held.last.clientY - held.from.clientY);
    if (event.pointerType === 'mouse' && far >= MOUSE_PIXELS) begin(held);
    else if (event.pointerType !== 'mouse' && far > FINGER_PIXELS) letGo();
  };
  const release = (event: PointerEvent) => {
    if (held?.pointer !== event.pointerId) return;
    const grip = held;
    letGo();
    justDropped = grip.dragging;
    if (grip.dragging) drop(scene(), grip);
  };
  // The click that ends a drag opens nothing.
  const click = (event: Event) => {
    if (justDropped) event.stopPropagation();
    justDropped = false;
  };
  const touch = (event: Event) => {
    if (held?.dragging) event.preventDefault();
  };
  return { take, move, release, putBack, click, touch };
}
