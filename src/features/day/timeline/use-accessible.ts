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
  const all = (selector: string) => frame.querySelectorAll<HTMLElement>(selector);
  // It calls the whole a grid, which bars as buttons may not be part of. The names of the rows are the table there is.
  setRole(all('.fc-scrollgrid[role="grid"], .fc-scrollgrid [role="rowgroup"]'), 'presentation');
  setRole(all('table.fc-datagrid-header:not([role="table"]), table.fc-datagrid-body:not([role="table"])'), 'table');
  setRole(all('.fc-timeline-body table:not([role])'), 'presentation');
  for (const table of all('.fc-timeline-body table[aria-hidden]')) table.removeAttribute('aria-hidden');
  for (const scroller of all('.fc-scroller')) mendScroller(scroller);
}

function setRole(elements: NodeListOf<HTMLElement>, role: string): void {
  for (const element of elements) element.setAttribute('role', role);
}

function mendScroller(scroller: HTMLElement): void {
  const scrolls = scroller.scrollWidth > scroller.clientWidth + 1;
  if (scrolls === (scroller.tabIndex === 0)) return;
  if (scrolls) {
    scroller.tabIndex = 0;
    scroller.setAttribute('role', 'group');
    scroller.setAttribute('aria-label', 'Booth day, scrolls sideways');
  } else {
    for (const name of ['tabindex', 'role', 'aria-label']) scroller.removeAttribute(name);
  }
}
