import { lazy, Suspense, useEffect, useState } from 'react';
import { isTyping } from '#src/lib/key-help.ts';

const KeyDialog = lazy(async () => ({ default: (await import('./key-dialog.tsx')).KeyDialog }));

/** `?` lists the keys, `/` goes to the page's search (an input with `data-search`). */
export function KeyList() {
  const [isOpen, setOpen] = useState(false);
  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      if (isTyping(event.target) || event.ctrlKey || event.metaKey || event.altKey || event.defaultPrevented) return;
      if (event.key === '?') setOpen(true);
      else if (event.key === '/') {
        const search = document.querySelector<HTMLInputElement>('[data-search]');
        if (!search) return;
        event.preventDefault();
        search.focus();
        search.select();
      }
    };
    addEventListener('keydown', onKey);
    return () => removeEventListener('keydown', onKey);
  }, []);
  return <Suspense>{isOpen && <KeyDialog onClose={() => setOpen(false)} />}</Suspense>;
}
