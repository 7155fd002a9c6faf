import { useEffect, useRef, type RefObject } from 'react';

/** The wheel with Ctrl (a pinch on a touchpad is the same) makes the hours wider or narrower instead of the page. */
export function useWheelZoom(
  box: RefObject<HTMLElement | null>,
  onZoom: (by: 1 | -1) => void,
  holdAt: (clientX: number) => void,
): void {
  const latest = useRef({ onZoom, holdAt });
  useEffect(() => {
    latest.current = { onZoom, holdAt };
  });
  useEffect(() => {
    const element = box.current;
    let turned = 0;
    const onWheel = (event: WheelEvent) => {
      if (!event.ctrlKey && !event.metaKey) return;
      event.preventDefault();
      turned += event.deltaY;
      // A notch of a wheel is about 100; a touchpad sends many small ones.
      if (Math.abs(turned) < 40) return;
      latest.current.holdAt(event.clientX);
      latest.current.onZoom(turned < 0 ? 1 : -1);
      turned = 0;
    };
    element?.addEventListener('wheel', onWheel, { passive: false });
    return () => element?.removeEventListener('wheel', onWheel);
  }, [box]);
}
