import { useRef, useState } from 'react';
import type { SheetDetail } from '#contracts/sheets.ts';
import { useLocalDraft } from '#src/lib/local-draft.ts';
import type { Edit } from '../model/body-edits.ts';
import { draftOf, isChanged, isDraft, type SheetDraft } from '../model/draft.ts';
import { same } from '../model/same.ts';
import { changed, historyOf, redone, undone, type History } from '../model/history.ts';

/**
 * The sheet as it stands in the editor: kept over a reload, with undo. `newest` is what the server has; where nothing was changed
 * here, a newer version simply takes its place.
 */
export function useDraft(name: string, initial: SheetDraft, newest: SheetDetail | null) {
  const local = useLocalDraft(name, initial, isDraft);
  const [history, setHistory] = useState<History<SheetDraft>>(() => historyOf(local.start));
  // What acts later, such as the undo of a toast, must see what has happened since.
  const latest = useRef(history);
  const draft = history.present;
  const dirty = isChanged(draft);
  const stale = newest !== null && newest.version !== draft.base.version;
  // What was just saved comes back as the newest version: it is no stranger's.
  const differs = dirty && newest !== null && !same(newest.body, draft.body);
  const renamed = newest !== null && !dirty && newest.name !== draft.base.name;

  const apply = (next: History<SheetDraft>): void => {
    latest.current = next;
    setHistory(next);
    if (isChanged(next.present)) local.keep(next.present);
    else local.drop();
  };
  const begin = (from: SheetDraft): void => apply(historyOf(from));
  return {
    draft,
    dirty,
    wasKept: local.wasKept && dirty && history.past.length === 0,
    /** The newer version, where both it and this draft have changes. */
    theirs: stale && differs ? newest : null,
    /** Takes over what the server has: nothing was changed here. */
    follow: newest && ((stale && !differs) || renamed) ? () => begin(draftOf(newest)) : null,
    canUndo: history.past.length > 0,
    canRedo: history.future.length > 0,
    edit: (edit: Edit, tag?: string) => {
      const { present } = latest.current;
      apply(changed(latest.current, { ...present, body: edit(present.body) }, tag ?? null));
    },
    rename: (to: string) => apply(changed(latest.current, { ...latest.current.present, name: to }, 'name')),
    undo: () => apply(undone(latest.current)),
    redo: () => apply(redone(latest.current)),
    begin,
    /** Goes on with what stands here, as a change of the version the server has now. */
    rebase: ({ version, name, body }: SheetDetail) =>
      apply({ ...latest.current, present: { ...latest.current.present, base: { version, name, body } }, tag: null }),
  };
}
export type Draft = ReturnType<typeof useDraft>;
