import { useEffect } from 'react';

/** What the browser's tab says. */
export function useTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Ovenbird`;
  }, [title]);
}
