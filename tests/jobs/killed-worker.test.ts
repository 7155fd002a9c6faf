import { spawn, type ChildProcess } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { once } from 'node:events';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { inShop } from '#server/db/in-shop.ts';
import { queueLetter } from '#server/db/letters.ts';
import { testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';
import { mailServer } from '../helpers/mail.ts';
import { eventually } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let owner: MadeMember;
const workers = new Set<ChildProcess>();
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
});
afterAll(async () => {
  for (const worker of workers) worker.kill('SIGKILL');
  await app.close();
  await database.drop();
});

/** The worker as it runs in the product, in a process of its own. */
function startWorker(smtpUrl: string): ChildProcess {
  const worker = spawn(process.execPath, ['--import', 'tsx', 'jobs/worker-main.ts'], {
    stdio: 'ignore',
    env: {
      PATH: process.env['PATH'],
      NODE_ENV: 'test',
      LOG_LEVEL: 'silent',
      DATABASE_URL: database.url,
      SESSION_SECRET: app.deps.config.SESSION_SECRET,
      PUBLIC_URL: app.deps.config.PUBLIC_URL,
      SMTP_URL: smtpUrl,
    },
  });
  workers.add(worker);
  worker.once('exit', () => workers.delete(worker));
  return worker;
}

const queue = (count: number) =>
  inShop(app.deps.db, owner, async (trx) => {
    for (let letter = 0; letter < count; letter += 1)
      await queueLetter(trx, owner, {
        kind: 'plan-changed',
        accountId: owner.accountId,
        toEmail: owner.email,
        subjectId: randomUUID(),
        subjectVersion: 1,
        data: { planNumber: 1, changes: [] },
      });
  });

test('a worker killed in the middle of a letter loses none; what comes twice has the same number', async () => {
  let hold = true;
  let reached = () => {};
  const inTheMiddle = new Promise<void>((resolve) => (reached = resolve));
  const taken: string[] = [];
  const mail = await mailServer({
    onData(stream, _session, done) {
      let text = '';
      stream.setEncoding('utf8').on('data', (chunk: string) => (text += chunk));
      stream.on('end', () => {
        taken.push(/^Message-ID: (.*)$/m.exec(text)?.[1]?.trim() ?? 'none');
        // The server has the letter, and the worker is killed before it hears so.
        if (hold) reached();
        else done();
      });
    },
  });
  await queue(12);
  const first = startWorker(mail.url);
  await inTheMiddle;
  first.kill('SIGKILL');
  await once(first, 'exit');
  const beforeKill = [...taken];
  hold = false;
  const second = startWorker(mail.url);
  type Row = { shop_id: string; id: string; state: string };
  const letters = await eventually(
    () => app.owner<Row>('letter').where({ shop_id: owner.shopId }),
    (rows) => rows.every((row) => row.state === 'sent'),
    60_000,
  );
  expect(letters).toHaveLength(12);
  expect(new Set(taken)).toEqual(new Set(letters.map((letter) => `<${letter.id}@ovenbird.test>`)));
  // No more than the four that were under way come twice.
  expect(taken.length - letters.length).toBeLessThanOrEqual(4);
  for (const id of beforeKill) expect(taken.filter((one) => one === id)).toHaveLength(2);
  second.kill('SIGTERM');
  const [code] = (await once(second, 'exit')) as [number];
  expect(code).toBe(0);
  await mail.close();
}, 120_000);
