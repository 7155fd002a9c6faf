import { FileUp, X } from 'lucide-react';
import { useRef, useState, type DragEvent } from 'react';
import { cx } from '#src/lib/cx.ts';
import { useFormats } from '#src/lib/session.ts';
import { Button } from '#src/ui/button.tsx';
import { EmptyState } from '#src/ui/empty-state.tsx';
import { Progress } from '#src/ui/progress.tsx';
import { BadRows } from './bad-rows.tsx';
import { FieldGrid, NumberField, TemperatureField } from './desk-fields.tsx';
import { exampleTrace } from './model/example-trace.ts';
import { judgingErrors } from './model/judge.ts';
import { Card, NotYet, Split } from './sections.tsx';
import { SheetPicker } from './sheet-picker.tsx';
import { useLastSettings } from './use-last-settings.ts';
import { useStoredTrace } from './use-stored-trace.ts';
import { useSheet } from './use-sheet.ts';
import { TraceColumns } from './trace-columns.tsx';
import { TraceResult } from './trace-result.tsx';
import { useDesk } from './use-desk.ts';
import type { TraceReader } from './use-trace-file.ts';

export function TraceTab({ reader }: { reader: TraceReader }) {
  const { values } = useDesk();
  const { unit } = useFormats();
  const sheet = useSheet();
  useStoredTrace(reader);
  useLastSettings();
  const { file } = reader;
  const errors = judgingErrors(values, unit);
  return (
    <Split
      asked={
        <>
          <FilePicker reader={reader} />
          {file.state === 'read' && <TraceColumns table={file.head} />}
          <SheetPicker />
          <Card title="Judged with">
            <FieldGrid>
              <NumberField
                name="done"
                label="Earlier bakes, min"
                hint="As minutes at the sheet’s bake; see Bakes."
                errors={errors}
              />
              <TemperatureField name="limit" label="Heat limit" optional hint="Of part or vehicle." errors={errors} />
            </FieldGrid>
          </Card>
        </>
      }
      found={
        file.state === 'read' ? (
          <>
            <Card title={`Bake in ${file.name}`}>
              {sheet?.ok && Object.keys(errors).length === 0 ? (
                <TraceResult fileName={file.name} head={file.head} desk={file.desk} sheet={sheet.value} />
              ) : (
                <NotYet />
              )}
            </Card>
            <BadRows table={file.head} />
          </>
        ) : (
          <Card title="Bake trace">
            <EmptyState
              title="Here the bake is drawn and judged"
              action={
                <Button onClick={() => reader.openText('an invented example', exampleTrace())}>See an example</Button>
              }
            >
              Open the CSV of a temperature logger: a column of times, one or more of temperatures in °C or °F. Comma,
              semicolon or tab, decimal point or comma.
            </EmptyState>
          </Card>
        )
      }
    />
  );
}

function FilePicker({ reader: { file, open, close } }: { reader: TraceReader }) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const [dropped] = event.dataTransfer.files;
    if (dropped) open(dropped);
  };
  return (
    <Card title="Logger file">
      <div
        onDragOver={(event) => {
          event.preventDefault();
          setOver(true);
        }}
        onDragLeave={() => setOver(false)}
        onDrop={drop}
        className={cx(
          'flex flex-col items-start gap-2 rounded border border-dashed p-3',
          over ? 'border-ember bg-ember-soft' : 'border-edge',
        )}
      >
        <input
          ref={input}
          type="file"
          accept=".csv,.txt,.tsv,text/csv,text/plain"
          aria-label="Logger file"
          className="sr-only"
          tabIndex={-1}
          onChange={(event) => {
            const [chosen] = event.target.files ?? [];
            if (chosen) open(chosen);
            // So that the same file, put right, can be chosen again.
            event.target.value = '';
          }}
        />
        <Button look="primary" icon={<FileUp size={16} aria-hidden="true" />} onClick={() => input.current?.click()}>
          Choose a file
        </Button>
        <p className="text-xs text-muted">
          Or drop it here. It is read in this browser and sent nowhere; the link does not hold it.
        </p>
      </div>
      {file.state === 'reading' && (
        <div className="flex items-center gap-3">
          <Progress label={`Reading ${file.name}`} value={file.share} className="grow" />
          <Button size="small" onClick={close}>
            Stop
          </Button>
        </div>
      )}
      {file.state === 'fault' && (
        <p role="alert" className="rounded border border-crimson bg-crimson-soft px-3 py-2">
          <strong className="break-words">{file.name}:</strong> {file.what} Nothing was changed; choose another file.
        </p>
      )}
      {file.state === 'read' && (
        <div className="flex items-center justify-between gap-2">
          <span className="min-w-0 truncate">
            <strong>{file.name}</strong>, {file.head.rows.toLocaleString('en-GB')} rows
          </span>
          <Button size="small" look="quiet" icon={<X size={15} aria-hidden="true" />} onClick={close}>
            Put away
          </Button>
        </div>
      )}
    </Card>
  );
}
