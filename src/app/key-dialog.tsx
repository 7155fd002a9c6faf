import { useKeyGroups } from '#src/lib/key-help.ts';
import { Dialog } from '#src/ui/dialog.tsx';

const everywhere = {
  title: 'Everywhere',
  keys: [
    { keys: '?', does: 'This list' },
    { keys: '/', does: 'Search' },
    { keys: 'Esc', does: 'Close, let go' },
  ],
};

/** The keys of the page that is shown, and those that work everywhere. */
export function KeyDialog({ onClose }: { onClose: () => void }) {
  const groups = [...useKeyGroups(), everywhere];
  return (
    <Dialog open onOpenChange={onClose} title="Keys">
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
