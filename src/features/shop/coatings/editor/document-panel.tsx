import { useMutation } from '@tanstack/react-query';
import { ExternalLink } from 'lucide-react';
import { useRef, useState } from 'react';
import { v7 } from 'uuid';
import { downloadAttachment, mostUploadBytes } from '#contracts/attachments.ts';
import { removeDataSheet, uploadDataSheet, type CoatingDetail } from '#contracts/coatings.ts';
import { addressOf, sendFile } from '#src/lib/api.ts';
import { useFormats, useShop } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { ConfirmDialog } from '#src/ui/dialog.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Progress } from '#src/ui/progress.tsx';
import { FileDrop } from '../../parts/file-drop.tsx';
import { useCoatingWrite, useKeepCoating } from '../data/use-coating-write.ts';

const megabytes = (bytes: number): string =>
  bytes < 1_048_576 ? `${Math.max(1, Math.round(bytes / 1024))} kB` : `${(bytes / 1_048_576).toFixed(1)} MB`;

/** The maker's own sheet as PDF: attach, open, replace, take off. */
export function DocumentPanel({ coating, mayKeep }: { coating: CoatingDetail; mayKeep: boolean }) {
  const { document: file } = coating;
  return (
    <section aria-label="The maker’s sheet" className="card flex flex-col gap-3 p-4">
      <h2 className="text-base font-bold">The maker’s sheet</h2>
      {file ? (
        <Attached coating={coating} file={file} mayKeep={mayKeep} />
      ) : (
        <p className="text-muted">No PDF is attached.</p>
      )}
      {mayKeep && <Attach coating={coating} />}
    </section>
  );
}

type AttachedProps = { coating: CoatingDetail; file: NonNullable<CoatingDetail['document']>; mayKeep: boolean };
function Attached({ coating, file, mayKeep }: AttachedProps) {
  const shop = useShop();
  const { dateTime } = useFormats();
  const [asked, setAsked] = useState(false);
  const keep = useKeepCoating();
  const remove = useCoatingWrite(removeDataSheet, (reply) => {
    keep(reply);
    setAsked(false);
  });
  const params = { shopId: shop.id, attachmentId: file.id };
  return (
    <div className="flex flex-wrap items-center justify-between gap-2">
      <div className="min-w-0">
        <a
          href={addressOf(downloadAttachment.path, params, { open: '1' })}
          target="_blank"
          rel="noopener"
          className="inline-flex min-h-6 items-center gap-1.5 font-semibold text-petrol wrap-anywhere underline"
        >
          {file.name}
          <ExternalLink size={14} className="shrink-0" aria-label="opens beside this page" />
        </a>
        <p className="text-xs text-muted">
          {megabytes(file.bytes)}, {dateTime(file.at)}
          {file.by && `, ${file.by}`}
        </p>
      </div>
      {mayKeep && (
        <Button size="small" look="quiet" onClick={() => setAsked(true)}>
          Take it off
        </Button>
      )}
      <ConfirmDialog
        open={asked}
        onOpenChange={setAsked}
        title={`Take ${file.name} off?`}
        about="The figures of the data sheet stay; the PDF can no longer be opened."
        deed="Take it off"
        busy={remove.isPending}
        onConfirm={() => remove.mutate({ params: { shopId: shop.id, coatingId: coating.id } })}
      >
        {remove.error !== null && <ErrorNote error={remove.error} what="It is still attached." />}
      </ConfirmDialog>
    </div>
  );
}

function Attach({ coating }: { coating: CoatingDetail }) {
  const shop = useShop();
  const keep = useKeepCoating();
  const stop = useRef<AbortController | null>(null);
  const send = useMutation({
    mutationFn: ({ file, key, signal }: { file: File; key: string; signal: AbortSignal }) =>
      sendFile(uploadDataSheet, { params: { shopId: shop.id, coatingId: coating.id }, file, key, signal }),
    onSuccess: keep,
  });
  const [tooLarge, setTooLarge] = useState(false);
  const take = (file: File) => {
    setTooLarge(file.size > mostUploadBytes);
    if (file.size > mostUploadBytes) return;
    stop.current = new AbortController();
    send.mutate({ file, key: v7(), signal: stop.current.signal });
  };
  const wasStopped = send.error instanceof DOMException;
  if (send.isPending)
    return (
      <div className="flex flex-col gap-2">
        <Progress label="Sending the PDF" value={null} />
        <Button size="small" className="self-start" onClick={() => stop.current?.abort()}>
          Stop sending
        </Button>
      </div>
    );
  return (
    <>
      <FileDrop
        label={coating.document ? 'Replace the PDF' : 'Attach a PDF'}
        accept=".pdf,application/pdf"
        again={coating.document !== null}
        onFile={take}
      />
      <p className="text-xs text-muted">A PDF of 10 MB at most.</p>
      {tooLarge && (
        <p role="alert" className="text-[0.8125rem] font-semibold text-crimson">
          That file is larger than 10 MB. Nothing was sent.
        </p>
      )}
      {wasStopped && <p role="status">Stopped. What was attached before still is.</p>}
      {send.error !== null && !wasStopped && !tooLarge && (
        <ErrorNote error={send.error} what="The PDF was not attached." kept="What was attached before still is." />
      )}
    </>
  );
}
