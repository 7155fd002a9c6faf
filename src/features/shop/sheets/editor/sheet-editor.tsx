import { useCallback, useEffect, useMemo, useState, type KeyboardEvent } from 'react';
import type { Coating } from '#contracts/coatings.ts';
import type { SheetBody, SheetDetail, SheetGround } from '#contracts/sheets.ts';
import { useFormats } from '#src/lib/session.ts';
import { Caution } from '#src/ui/caution.tsx';
import { changesBetween, type Change } from '../model/changes.ts';
import { draftOf, type SheetDraft } from '../model/draft.ts';
import { faultsOf } from '../model/faults.ts';
import { ChainDrawing } from './chain-drawing.tsx';
import { EditorContext, type EditorParts } from './editor-context.ts';
import { FaultsPanel } from './faults-panel.tsx';
import { NewerVersion } from './newer-version.tsx';
import { Kept, SaveBar } from './save-bar.tsx';
import { SaveDialog } from './save-dialog.tsx';
import { SheetForm } from './sheet-form.tsx';
import { StageForm } from './stage-form.tsx';
import { StageList } from './stage-list.tsx';
import { useDraft } from './use-draft.ts';
import { useStageLink } from './use-stage-link.ts';
import { VersionsList } from './versions-list.tsx';
import { Suggestions } from './suggestions.tsx';

export type Saving = {
  busy: boolean;
  error: unknown;
  /** `done` with the sheet as it was saved. */
  save: (draft: SheetDraft, version: number, note: string, done: (saved: SheetDetail) => void) => void;
  reset: () => void;
};
type SheetEditorProps = {
  draftName: string;
  initial: SheetDraft;
  /** Null: it has not been saved yet. */
  sheet: SheetDetail | null;
  coatings: readonly Coating[];
  ground: SheetGround | null;
  readOnly: boolean;
  saving: Saving;
};

export function SheetEditor({ draftName, initial, sheet, coatings, ground, readOnly, saving }: SheetEditorProps) {
  const formats = useFormats();
  const draft = useDraft(draftName, initial, sheet);
  const { draft: present, follow } = draft;
  const { body } = present;
  const [isSaving, setSaving] = useState(false);
  const [broken, setBroken] = useState<readonly string[]>([]);
  const reportBroken = useCallback(
    (field: string, is: boolean) => setBroken((all) => [...all.filter((one) => one !== field), ...(is ? [field] : [])]),
    [],
  );
  const faults = useMemo(
    () => faultsOf({ name: present.name, body }, coatings, ground, formats),
    [present.name, body, coatings, ground, formats],
  );
  const changesFrom = (older: SheetBody): Change[] => changesBetween(older, body, wordsFor(formats, coatings));
  const stops = faults.filter(({ severity }) => severity === 'stop').length + broken.length;
  const { stage, open, goTo } = useStageLink(body);
  useEffect(() => {
    follow?.();
  }, [follow]);
  const parts: EditorParts = {
    body,
    name: present.name,
    rename: draft.rename,
    edit: draft.edit,
    undo: draft.undo,
    coatings,
    ground,
    faults,
    readOnly,
    reportBroken,
    open,
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
    const key = event.key.toLowerCase();
    if (key === 's' && !readOnly) setSaving(stops === 0 && draft.dirty);
    else if (key === 'z' && !event.shiftKey) draft.undo();
    else if (key === 'y' || key === 'z') draft.redo();
    else return;
    event.preventDefault();
  };
  const version = (sheet?.version ?? 0) + 1;
  return (
    <EditorContext value={parts}>
      {/* Undo, redo and saving from wherever in the editor the focus is. */}
      <div onKeyDown={onKeyDown} className="flex min-w-0 flex-col gap-4">
        <Suggestions />
        {draft.theirs && (
          <NewerVersion
            theirs={draft.theirs}
            changes={changesFrom(draft.theirs.body)}
            onTakeTheirs={() => draft.theirs && draft.begin(draftOf(draft.theirs))}
            onKeepMine={() => draft.theirs && draft.rebase(draft.theirs)}
          />
        )}
        {draft.wasKept && <Kept onDrop={() => draft.begin(sheet ? draftOf(sheet) : initial)} />}
        <ChainDrawing chosen={stage?.key ?? null} />
        <div className="grid items-start gap-4 lg:grid-cols-[18rem_minmax(0,1fr)] lg:grid-rows-[auto_1fr]">
          <StageList chosen={stage?.key ?? null} />
          <fieldset
            id="sheet-form"
            disabled={readOnly}
            className="min-w-0 scroll-mt-16 lg:col-start-2 lg:row-span-2 lg:row-start-1"
          >
            {stage ? <StageForm key={stage.key} stage={stage} /> : <SheetForm />}
          </fieldset>
          <div className="flex min-w-0 flex-col gap-4 lg:col-start-1">
            <FaultsPanel onJump={goTo} />
            {sheet && (
              <VersionsList
                sheet={sheet}
                changesTo={changesFrom}
                onTake={readOnly ? null : (older) => draft.edit(() => older)}
              />
            )}
          </div>
        </div>
        <Caution quiet>
          Minutes that are not from a data sheet are common practice, to be checked against the maker’s sheet, which
          comes first, as do local fire and health rules and the licensed people responsible. Isocyanate coatings need
          supplied air. Purge before heat; lamps out before spraying.
        </Caution>
        {!readOnly && (
          <SaveBar
            draft={draft}
            stops={stops}
            version={version}
            onSave={() => {
              saving.reset();
              setSaving(true);
            }}
          />
        )}
        {isSaving && (
          <SaveDialog
            version={version}
            changes={changesFrom(sheet?.body ?? present.base.body)}
            openJobs={sheet?.versions.reduce((sum, { openJobs }) => sum + openJobs, 0) ?? 0}
            warnings={faults.length - stops}
            busy={saving.busy}
            error={saving.error}
            onClose={() => setSaving(false)}
            onSave={(note) =>
              saving.save(present, present.base.version, note, (saved) => {
                draft.begin(draftOf(saved));
                setSaving(false);
              })
            }
          />
        )}
      </div>
    </EditorContext>
  );
}

const wordsFor = ({ duration, temperature }: ReturnType<typeof useFormats>, coatings: readonly Coating[]) => ({
  duration,
  temperature: (celsius: number) => temperature(celsius),
  coating: (id: string) => coatings.find((one) => one.id === id)?.name ?? 'one not in use any more',
});
