import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { v7 } from 'uuid';
import { sheetFile, type SheetFile } from '#contracts/sheets.ts';
import { paths } from '#src/app/paths.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { TextField } from '#src/ui/text-field.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { FileDrop } from '../parts/file-drop.tsx';
import { useImportSheet } from './data/use-sheet-deeds.ts';

type Read = { id: string; file: SheetFile; name: string } | { fault: string };

/** Takes in a sheet that was saved as a file, here or in another shop. Its coatings must be there under their names. */
export function ImportDialog({ onClose }: { onClose: () => void }) {
  const shop = useShop();
  const navigate = useNavigate();
  const take = useImportSheet(shop.id);
  const [read, setRead] = useState<Read | null>(null);
  const chosen = read && 'file' in read ? read : null;
  const send = () => {
    if (!chosen) return;
    const { id, file, name } = chosen;
    take.mutate(
      { id, file, name: name.trim() },
      {
        onSuccess: (sheet) => {
          showToast(`${sheet.name} is taken in.`, { tone: 'good' });
          void navigate(paths.sheet(sheet.id));
        },
      },
    );
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="A process sheet from a file"
      about="A file that was saved from a process sheet. It becomes a new sheet; nothing else changes."
      actions={
        chosen && (
          <Button look="primary" busy={take.isPending} disabled={chosen.name.trim() === ''} onClick={send}>
            Take it in
          </Button>
        )
      }
    >
      <div className="flex flex-col gap-3">
        <FileDrop
          label="A file of one process sheet (.json)"
          accept=".json,application/json"
          again={read !== null}
          onFile={(file) => {
            take.reset();
            void readFile(file).then(setRead);
          }}
        />
        {read && 'fault' in read && (
          <p role="alert" className="font-semibold text-crimson">
            {read.fault}
          </p>
        )}
        {chosen && (
          <>
            <TextField
              label="Name of the new sheet"
              maxLength={120}
              value={chosen.name}
              onChange={({ target }) => setRead({ ...chosen, name: target.value })}
            />
            <p className="text-muted">
              {chosen.file.body.stages.length} stages: {chosen.file.body.stages.map(({ title }) => title).join(', ')}.
            </p>
          </>
        )}
        {take.error != null && <ErrorNote error={take.error} what="It was not taken in." kept="Nothing was changed." />}
      </div>
    </Dialog>
  );
}

async function readFile(file: File): Promise<Read> {
  let value: unknown;
  try {
    value = JSON.parse(await file.text());
  } catch {
    return { fault: `${file.name} is no JSON file, or it is damaged.` };
  }
  const parsed = sheetFile.safeParse(value);
  if (parsed.success) return { id: v7(), file: parsed.data, name: parsed.data.name };
  const [first] = parsed.error.issues;
  const where = first?.path.join('.') ?? '';
  return {
    fault: `${file.name} holds no process sheet of this program${where ? ` (at ${where}: ${first?.message})` : ''}.`,
  };
}
