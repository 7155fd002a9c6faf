import { useEffect, useState, type RefObject } from 'react';
import type FullCalendar from '@fullcalendar/react';

/** Width of the frame in pixels. Tells the calendar library, too, which by itself only looks when the window changes. */
export function useWidth(frame: RefObject<HTMLElement | null>, calendar: RefObject<FullCalendar | null>): number {
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const element = frame.current;
    if (!element) return undefined;
    const observer = new ResizeObserver(([entry]) => {
      setWidth(Math.round(entry?.contentRect.width ?? 0));
      calendar.current?.getApi().updateSize();
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [frame, calendar]);
  return width;
}
