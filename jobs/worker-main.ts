import { makeMailer } from '#server/mail/mailer.ts';
import { openProgram } from '#server/program.ts';
import { lanes, registry } from './registry.ts';
import { startSchedule } from './schedule.ts';
import type { JobDeps } from './task-function.ts';
import { growingDelay, startWorker } from './worker.ts';

const graceMilliseconds = 8_000;

const program = openProgram();
const { config, log } = program;
const deps: JobDeps = {
  ...program,
  mailer: config.SMTP_URL === undefined ? null : makeMailer(config, config.SMTP_URL),
};
if (!deps.mailer) log.warn('SMTP_URL is not set: letters are kept and wait');
const mailLanes = lanes.filter((lane) => deps.mailer !== null || !lane.kinds.includes('send-letter'));

const stopWorker = startWorker(deps, { registry, lanes: mailLanes, retryDelay: growingDelay, pollEvery: 2_000 });
const stopSchedule = await startSchedule(deps);
log.info('worker started');

let stopping = false;
async function stop(signal: string): Promise<void> {
  if (stopping) return;
  stopping = true;
  log.info({ signal }, 'worker stopping');
  // Whatever hangs is left to the database, which frees its row when the connection goes.
  setTimeout(() => process.exit(0), graceMilliseconds).unref();
  await stopSchedule();
  await stopWorker();
  await deps.db.destroy();
  process.exit(0);
}
for (const signal of ['SIGTERM', 'SIGINT']) process.on(signal, () => void stop(signal));
