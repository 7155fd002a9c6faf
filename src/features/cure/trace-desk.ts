import {
  traceEngine,
  type JudgeAnswer,
  type JudgeQuestion,
  type TraceDeed,
  type TraceHead,
  type TraceReply,
} from './model/trace-engine.ts';
import type { PackedTrace } from './model/pack-trace.ts';
import type { FromWorker, ToWorker } from './model/trace.worker.ts';
import type { TraceChoice } from './model/trace.ts';

type Options = { onProgress?: (share: number) => void };
type Ask = (deed: TraceDeed, options?: Options) => Promise<TraceReply>;

/** A file under examination. `close` lets go of it and of what still works on it. */
export type TraceDesk = {
  read(text: string, options: Options): Promise<{ ok: true; head: TraceHead } | { ok: false; what: string }>;
  judge(question: JudgeQuestion): Promise<JudgeAnswer>;
  pack(choice: TraceChoice): Promise<PackedTrace>;
  close(): void;
};

/** In a worker, so that the page never waits; in the page itself where a browser has none. */
export function openTraceDesk(): TraceDesk {
  const { ask, close } = typeof Worker === 'undefined' ? inPage() : inWorker();
  return {
    close,
    read: async (text, options) => {
      const reply = await ask({ kind: 'read', text }, options);
      return reply.kind === 'read' ? reply.result : unexpected();
    },
    judge: async (question) => {
      const reply = await ask({ kind: 'judge', question });
      return reply.kind === 'judge' ? reply.answer : unexpected();
    },
    pack: async (choice) => {
      const reply = await ask({ kind: 'pack', choice });
      return reply.kind === 'pack' ? reply.packed : unexpected();
    },
  };
}

const unexpected = (): never => {
  throw new Error('The answer belongs to another question.');
};

function inPage(): { ask: Ask; close: () => void } {
  const stop = new AbortController();
  const engine = traceEngine();
  return { ask: (deed, options) => engine(deed, { signal: stop.signal, ...options }), close: () => stop.abort() };
}

function inWorker(): { ask: Ask; close: () => void } {
  const worker = new Worker(new URL('./model/trace.worker.ts', import.meta.url), { type: 'module' });
  type Waiting = { done: (reply: TraceReply) => void; failed: (error: Error) => void; options: Options };
  const waiting = new Map<number, Waiting>();
  let asked = 0;
  worker.addEventListener('message', ({ data }: MessageEvent<FromWorker>) => {
    const one = waiting.get(data.id);
    if (!one) return;
    if ('share' in data) return one.options.onProgress?.(data.share);
    waiting.delete(data.id);
    if ('reply' in data) one.done(data.reply);
    else one.failed(new Error(data.fault));
  });
  worker.addEventListener('error', (event) => {
    event.preventDefault();
    for (const { failed } of waiting.values()) failed(new Error(event.message || 'the reader stopped'));
    waiting.clear();
  });
  const ask: Ask = (deed, options = {}) =>
    new Promise((done, failed) => {
      asked += 1;
      waiting.set(asked, { done, failed, options });
      worker.postMessage({ id: asked, deed } satisfies ToWorker);
    });
  return { ask, close: () => worker.terminate() };
}
