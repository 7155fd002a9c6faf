import { useMutation } from '@tanstack/react-query';
import { FileDown, FileUp } from 'lucide-react';
import { useState } from 'react';
import type { csvExport, csvImport, csvReport } from '#contracts/csv.ts';
import type { inShop } from '#contracts/common.ts';
import type { Endpoint, nothing } from '#contracts/endpoint.ts';
import { call } from '#src/lib/api.ts';
import { errorText } from '#src/lib/error-texts.ts';
import { useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { showToast } from '#src/ui/toast-store.ts';
import { CsvImportDialog } from './csv-import-dialog.tsx';

import { saveCsv } from './save-csv.ts';

export type CsvExportEndpoint = Endpoint<typeof inShop, typeof nothing, typeof nothing, typeof csvExport>;
export type CsvImportEndpoint = Endpoint<typeof inShop, typeof nothing, typeof csvImport, typeof csvReport>;

export type CsvPanelProps = {
  /** What the lines are, small and plural: "people". */
  what: string;
  exportFrom: CsvExportEndpoint;
  /** Absent where the reader may not write. */
  importTo?: CsvImportEndpoint | undefined;
  /** The columns in a sentence or two, shown before a file is chosen. */
  columns: string;
};

/** A list as a file and back: goes into the actions of a page. */
export function CsvPanel({ what, exportFrom, importTo, columns }: CsvPanelProps) {
  const shop = useShop();
  const [isOpen, setOpen] = useState(false);
  const save = useMutation({
    mutationFn: () => call(exportFrom, { params: { shopId: shop.id } }),
    onSuccess: saveCsv,
    onError: (error) => showToast(`No file was saved. ${errorText(error).what}`, { tone: 'bad' }),
  });
  return (
    <>
      <Button
        icon={<FileDown size={16} aria-hidden="true" />}
        busy={save.isPending}
        aria-label={`Export ${what} as CSV`}
        onClick={() => save.mutate()}
      >
        Export
      </Button>
      {importTo && (
        <>
          <Button
            icon={<FileUp size={16} aria-hidden="true" />}
            aria-label={`Import ${what} from CSV`}
            onClick={() => setOpen(true)}
          >
            Import
          </Button>
          <CsvImportDialog open={isOpen} onOpenChange={setOpen} what={what} importTo={importTo} columns={columns} />
        </>
      )}
    </>
  );
}
