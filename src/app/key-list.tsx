import { useEffect, useState } from 'react';
import { isTyping, useKeyGroups } from '#src/lib/key-help.ts';
import { Dialog } from '#src/ui/dialog.tsx';

const everywhere = {
  title: 'Everywhere',
  keys: [
    { keys: '?', does: 'This list' },
    { keys: '/', does: 'Search' },
    { keys: 'Esc', does: 'Close, let go' },
  ],
};

/** `?` lists the keys, `/` goes to the page's search (an input with `data-search`). */
export function KeyList() {
  const [isOpen, setOpen] = useState(false);
  const groups = [...useKeyGroups(), everywhere];
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
  return (
    <Dialog open={isOpen} onOpenChange={setOpen} title="Keys">
      <div className="flex flex-col gap-5">
        {groups.map((group) => (
          <section key={group.title}>
            <h3 className="mb-2 text-xs font-semibold text-muted">{group.title}</h3>
            <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1.5">
              {group.keys.map(({ keys, does }) => (
                <div key={keys + does} className="contents">
                  <dt>
                    <kbd className="rounded-sm border border-edge bg-paper px-1.5 font-sans text-xs font-semibold">
                      {keys}
                    </kbd>
                  </dt>
                  <dd>{does}</dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
      </div>
    </Dialog>
  );
}
