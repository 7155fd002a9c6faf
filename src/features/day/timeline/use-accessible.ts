import { useEffect, type RefObject } from 'react';

/**
 * What the calendar library leaves undone for keyboards and screen readers: its rows of bars are marked as hidden from
 * readers, and what scrolls cannot be reached. Watched, because it draws again when it pleases.
 */
export function useAccessible(frame: RefObject<HTMLElement | null>): void {
  useEffect(() => {
    const element = frame.current;
    if (!element) return undefined;
    const mend = () => mendIn(element);
    mend();
    const observer = new MutationObserver(mend);
    observer.observe(element, { subtree: true, childList: true, attributeFilter: ['aria-hidden'] });
    addEventListener('resize', mend);
    return () => {
      observer.disconnect();
      removeEventListener('resize', mend);
    };
  }, [frame]);
}

function mendIn(frame: HTMLElement): void {
  for (const table of frame.querySelectorAll('.fc-timeline-body table[aria-hidden]'))
    table.removeAttribute('aria-hidden');
  for (const table of frame.querySelectorAll('.fc-timeline-body table:not([role])'))
    table.setAttribute('role', 'presentation');
  for (const scroller of frame.querySelectorAll<HTMLElement>('.fc-scroller')) {
    const scrolls = scroller.scrollWidth > scroller.clientWidth + 1;
    if (scrolls === (scroller.tabIndex === 0)) continue;
    if (scrolls) {
      scroller.tabIndex = 0;
      scroller.setAttribute('role', 'group');
      scroller.setAttribute('aria-label', 'Booth day, scrolls sideways');
    } else {
      for (const name of ['tabindex', 'role', 'aria-label']) scroller.removeAttribute(name);
    }
  }
}
