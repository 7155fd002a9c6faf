import { useCallback, useEffect, useRef, useState } from 'react';
import { decodeText } from '#src/lib/decode-text.ts';
import type { TraceHead } from './model/trace-engine.ts';
import { openTraceDesk, type TraceDesk } from './trace-desk.ts';

/** More than a logger writes in a year; a browser's memory has an end. */
const mostBytes = 60 * 1024 * 1024;

export type TraceFile =
  | { state: 'none' }
  | { state: 'reading'; name: string; share: number }
  | { state: 'fault'; name: string; what: string }
  | { state: 'read'; name: string; head: TraceHead; desk: TraceDesk };

export type TraceReader = {
  file: TraceFile;
  open: (file: File) => void;
  openText: (name: string, text: string | (() => Promise<string>)) => void;
  /** Stops the reading, or puts the file away. */
  close: () => void;
};

/** Reads a logger's file in this browser; it is sent nowhere by that. Kept while the desk is open, whichever tab is shown. */
export function useTraceFile(): TraceReader {
  const [file, setFile] = useState<TraceFile>({ state: 'none' });
  const running = useRef<TraceDesk | null>(null);
  useEffect(() => () => running.current?.close(), []);

  const start = useCallback((name: string, textOf: () => string | Promise<string>) => {
    running.current?.close();
    const desk = openTraceDesk();
    running.current = desk;
    const put = (next: TraceFile) => {
      if (running.current === desk) setFile(next);
    };
    put({ state: 'reading', name, share: 0 });
    const run = async () => {
      const onProgress = (share: number) => put({ state: 'reading', name, share });
      const result = await desk.read(await textOf(), { onProgress });
      put(result.ok ? { state: 'read', name, head: result.head, desk } : { state: 'fault', name, what: result.what });
    };
    run().catch((error: unknown) => {
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
  const openText = useCallback(
    (name: string, text: string | (() => Promise<string>)) =>
      start(name, () => (typeof text === 'string' ? text : text())),
    [start],
  );
  const close = useCallback(() => {
    running.current?.close();
    running.current = null;
    setFile({ state: 'none' });
  }, []);
  return { file, open, openText, close };
}
