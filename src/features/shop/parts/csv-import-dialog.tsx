import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { v7 } from 'uuid';
import { call } from '#src/lib/api.ts';
import { decodeText } from '#src/lib/decode-text.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { Dialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Progress } from '#src/ui/progress.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import type { CsvImportEndpoint } from './csv-panel.tsx';
import { CsvReportView } from './csv-report.tsx';
import { FileDrop } from './file-drop.tsx';

type CsvImportDialogProps = {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  what: string;
  importTo: CsvImportEndpoint;
  columns: string;
};

/** What a request may hold, less what JSON adds; see csvImport. */
const mostCharacters = 900_000;

/** Choose a file, read what it would do line by line, and only when nothing is wrong take all of it. */
export function CsvImportDialog({ open, onOpenChange, what, importTo, columns }: CsvImportDialogProps) {
  const { chosen, tried, take, fault, choose, close } = useImport(importTo, what, () => onOpenChange(false));
  const report = tried.data;
  const isClean = report !== undefined && report.faults.length === 0 && report.lines > 0;
  return (
    <Dialog
      open={open}
      onOpenChange={(next) => (next ? onOpenChange(true) : close())}
      shape="wide"
      title={`Import ${what}`}
      about="All lines are taken or none. First you see what each would do; nothing is written yet."
      actions={
        <>
          <Button onClick={close}>{take.isSuccess ? 'Close' : 'Leave it'}</Button>
          {isClean && (
            <Button look="primary" busy={take.isPending} onClick={() => take.mutate()}>
              {report.lines === 1 ? 'Take the line' : `Take all ${report.lines} lines`}
            </Button>
          )}
        </>
      }
    >
      <div className="flex flex-col gap-4">
        <FileDrop label={`CSV file of ${what}`} onFile={choose} again={chosen !== null} />
        {chosen === null && <p className="text-muted">{columns}</p>}
        {fault && (
          <p role="alert" className="rounded border border-crimson bg-crimson-soft px-3 py-2">
            {fault}
          </p>
        )}
        {tried.isPending && chosen && <Progress label={`Looking through ${chosen.name}`} value={null} />}
        {tried.isError && <ErrorNote error={tried.error} what="The file could not be looked through." />}
        {report && chosen && <CsvReportView name={chosen.name} report={report} />}
        {take.isError && <ErrorNote error={take.error} what="Nothing was taken." />}
      </div>
    </Dialog>
  );
}

type Chosen = { name: string; csv: string; key: string };

function useImport(importTo: CsvImportEndpoint, what: string, shut: () => void) {
  const shop = useShop();
  const client = useQueryClient();
  const [chosen, setChosen] = useState<Chosen | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const params = { shopId: shop.id };
  const tried = useMutation({
    mutationFn: ({ csv }: Chosen) => call(importTo, { params, body: { csv, tryOnly: true } }),
  });
  const close = () => {
    setChosen(null);
    setFault(null);
    tried.reset();
    take.reset();
    shut();
  };
  const take = useMutation({
    // The file's own key: pressed twice, or sent again after a lost answer, it is taken once.
    mutationFn: () =>
      call(importTo, { params, key: chosen?.key ?? v7(), body: { csv: chosen?.csv ?? '', tryOnly: false } }),
    onSuccess: async (report) => {
      if (report.faults.length > 0 && chosen) return tried.mutate(chosen);
      await client.invalidateQueries({ queryKey: [shop.id] });
      showToast(`${report.lines} lines of ${what}: ${report.added} new, ${report.changed} changed`, { tone: 'good' });
      close();
    },
  });
  const choose = async (file: File) => {
    setFault(null);
    take.reset();
    tried.reset();
    const csv = decodeText(new Uint8Array(await file.arrayBuffer()));
    if (csv.length > mostCharacters) {
      setChosen(null);
      setFault(
        `${file.name} is too large: ${mostCharacters.toLocaleString('en')} characters can be taken at once. Divide it.`,
      );
      return;
    }
    const next = { name: file.name, csv, key: v7() };
    setChosen(next);
    tried.mutate(next);
  };
  return { chosen, tried, take, fault, close, choose: (file: File) => void choose(file) };
}
