import { traceEngine, type TraceDeed, type TraceReply } from './trace-engine.ts';

export type ToWorker = { id: number; deed: TraceDeed };
export type FromWorker =
  { id: number; share: number } | { id: number; reply: TraceReply } | { id: number; fault: string };

const answer = traceEngine();
const say = (message: FromWorker) => postMessage(message);

addEventListener('message', ({ data: { id, deed } }: MessageEvent<ToWorker>) => {
  answer(deed, { onProgress: (share) => say({ id, share }) }).then(
    (reply) => say({ id, reply }),
    (error: unknown) => say({ id, fault: error instanceof Error ? error.message : 'unknown fault' }),
  );
});
