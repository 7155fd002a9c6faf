import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:http';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pino } from 'pino';
import { createApp } from '#server/app.ts';
import { readConfig } from '#server/config.ts';
import { connect } from '#server/db/connect.ts';
import type { Deps } from '#server/deps.ts';
import { startLocalMail } from '#server/mail/local-mail.ts';
import { prepareDummyHash } from '#server/services/passwords.ts';
import { buildWeb } from '../../../scripts/lib/build.mjs';
import { freePort } from '../../../scripts/lib/ports.mjs';
import { seedDemo } from '../../../seeds/index.ts';
import type { TestDatabase } from '../../helpers/database.ts';
import { tempStorage } from '../../helpers/storage.ts';
import { startTestWorker } from '../../helpers/worker.ts';

/** A Tuesday, 10:20 in the demo shop's zone (Europe/Amsterdam): both shifts are in, the morning's work has begun. */
export const morning = new Date('2026-03-10T09:20:00Z');

export type Program = {
  url: string;
  /** The time of the program: begins at `morning` and goes on from there. */
  now: () => Date;
  /** Folder of the local mail server: a JSON file a letter. */
  mailFolder: string;
  close(): Promise<void>;
};

/**
 * What `npm start` brings up, in this process: the built pages, web server, worker with its planning thread, local mail
 * server and demo shop. In this process because the clock of a child cannot be set, and the demo is another one on a
 * Sunday night than on a Tuesday morning.
 */
export async function startProgram(database: TestDatabase): Promise<Program> {
  // Does nothing where what was built is of these sources.
  await buildWeb();
  await seedDemo(database.ownerUrl, morning);
  const began = Date.now();
  const now = () => new Date(morning.getTime() + Date.now() - began);
  const mailFolder = mkdtempSync(path.join(tmpdir(), 'ovenbird-mail-'));
  const mail = await startLocalMail({ folder: mailFolder, port: 0 });
  const port = await freePort();
  const smtpUrl = `smtp://127.0.0.1:${mail.port}`;
  const config = readConfig({
    NODE_ENV: 'test',
    PORT: String(port),
    DATABASE_URL: database.url,
    SESSION_SECRET: 'a secret for tests only, 32 characters or more',
    SMTP_URL: smtpUrl,
    DEV_MAILBOX_DIR: mailFolder,
  });
  const db = connect(database.url, config.DATABASE_POOL);
  const deps: Deps = { config, db, log: pino({ level: 'silent' }), now, storage: tempStorage() };
  const program = createApp(deps);
  await prepareDummyHash(deps);
  program.start();
  const server = createServer(program.app).listen(port, '127.0.0.1');
  await once(server, 'listening');
  const stopWorker = startTestWorker(deps, smtpUrl);
  const close = async () => {
    await program.drain();
    server.closeAllConnections();
    server.close();
    await stopWorker();
    await Promise.all([program.close(), mail.close()]);
    await deps.db.destroy();
    rmSync(mailFolder, { recursive: true, force: true });
  };
  return { url: `http://127.0.0.1:${port}`, now, mailFolder, close };
}
