import { useCallback, useRef, useState } from 'react';
import { decodeText } from '#src/lib/decode-text.ts';
import { readTable, type TraceTable } from './model/csv/read-table.ts';

/** More than a logger writes in a year; a browser's memory has an end. */
const mostBytes = 60 * 1024 * 1024;

export type TraceFile =
  | { state: 'none' }
  | { state: 'reading'; name: string; share: number }
  | { state: 'fault'; name: string; what: string }
  | { state: 'read'; name: string; table: TraceTable };

export type TraceReader = {
  file: TraceFile;
  open: (file: File) => void;
  openText: (name: string, text: string) => void;
  /** Stops the reading, or puts the file away. */
  close: () => void;
};

/** Reads a logger's file in this browser; it is sent nowhere. Kept while the desk is open, whichever tab is shown. */
export function useTraceFile(): TraceReader {
  const [file, setFile] = useState<TraceFile>({ state: 'none' });
  const running = useRef<AbortController | null>(null);

  const start = useCallback((name: string, textOf: () => string | Promise<string>) => {
    running.current?.abort();
    const stop = new AbortController();
    running.current = stop;
    const put = (next: TraceFile) => {
      if (!stop.signal.aborted) setFile(next);
    };
    put({ state: 'reading', name, share: 0 });
    const run = async () => {
      const text = await textOf();
      const onProgress = (share: number) => put({ state: 'reading', name, share });
      const result = await readTable(text, { signal: stop.signal, onProgress });
      put(result.ok ? { state: 'read', name, table: result.table } : { state: 'fault', name, what: result.what });
    };
    run().catch((error: unknown) => {
      if (stop.signal.aborted) return;
      put({
        state: 'fault',
        name,
        what: `The file could not be read: ${error instanceof Error ? error.message : 'unknown fault'}.`,
      });
    });
  }, []);

  const open = useCallback(
    (given: File) =>
      start(given.name, async () => {
        if (given.size > mostBytes) throw new Error('it is larger than 60 MB');
        return decodeText(new Uint8Array(await given.arrayBuffer()));
      }),
    [start],
  );
  const openText = useCallback((name: string, text: string) => start(name, () => text), [start]);
  const close = useCallback(() => {
    running.current?.abort();
    setFile({ state: 'none' });
  }, []);
  return { file, open, openText, close };
}
