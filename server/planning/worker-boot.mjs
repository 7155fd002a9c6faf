// Node cannot read TypeScript in a worker thread; in the sources tsx is put in front of it. The built program needs none.
import { workerData } from 'node:worker_threads';
import { register } from 'tsx/esm/api';

register();
await import(new URL(workerData.entry, import.meta.url).href);
