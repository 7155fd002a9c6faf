import { randomUUID } from 'node:crypto';
import type { SMTPServerOptions } from 'smtp-server';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { inShop } from '#server/db/in-shop.ts';
import { queueLetter } from '#server/db/letters.ts';
import { enqueue } from '#server/db/tasks.ts';
import { askForNightlyTasks } from '../../jobs/schedule.ts';
import { GiveUp, type TaskDefinition } from '../../jobs/task-function.ts';
import { growingDelay } from '../../jobs/worker.ts';
import { signedIn, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';
import { mailServer, type MailServer } from '../helpers/mail.ts';
import { eventually, startTestWorker } from '../helpers/worker.ts';

let database: TestDatabase;
let app: TestApp;
let owner: MadeMember;
const open: (() => Promise<void>)[] = [];
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  owner = await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
});
afterEach(async () => {
  for (const close of open.splice(0).reverse()) await close();
  await app.owner('letter').delete();
  await app.owner('task').delete();
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

async function postOffice(options: SMTPServerOptions = {}): Promise<MailServer> {
  const mail = await mailServer(options);
  open.push(() => mail.close());
  return mail;
}
const work = (...given: Parameters<typeof startTestWorker>) => open.push(startTestWorker(...given));

const data = {
  planNumber: 1,
  changes: [
    {
      kind: 'taken-off' as const,
      jobNumber: 1,
      jobTitle: 'Door',
      stageTitle: 'Base',
      from: { placeName: 'Booth', startsAt: '2026-03-10T12:00:00Z', endsAt: '2026-03-10T13:00:00Z' },
      to: null,
    },
  ],
};
const queue = (more: Partial<Parameters<typeof queueLetter>[2]> = {}) =>
  inShop(app.deps.db, owner, (trx) =>
    queueLetter(trx, owner, {
      kind: 'plan-changed',
      accountId: owner.accountId,
      toEmail: owner.email,
      subjectId: randomUUID(),
      subjectVersion: 1,
      data,
      ...more,
    }),
  );
type LetterRow = { shop_id: string; id: string; state: string; last_error: string | null; to_email: string };
const letters = () => app.owner<LetterRow>('letter').where({ shop_id: owner.shopId });
const settled = () => eventually(letters, (rows) => rows.every((row) => row.state !== 'queued'));

describe('a letter', () => {
  test('is there if and only if its transaction commits, once for one event', async () => {
    const subjectId = randomUUID();
    const failing = inShop(app.deps.db, owner, async (trx) => {
      const letter = { accountId: null, toEmail: owner.email, subjectId, subjectVersion: 1, data };
      await queueLetter(trx, owner, { kind: 'plan-changed', ...letter });
      throw new Error('no');
    });
    await expect(failing).rejects.toThrow();
    expect([await letters(), await app.owner('task')]).toEqual([[], []]);
    await Promise.all([queue({ subjectId }), queue({ subjectId }), queue({ subjectId })]);
    expect(await letters()).toHaveLength(1);
    expect(await app.owner('task')).toHaveLength(1);
    await queue({ subjectId, subjectVersion: 2 });
    expect(await letters()).toHaveLength(2);
  });

  test('is sent once, by one of three workers', async () => {
    const mail = await postOffice();
    for (let worker = 0; worker < 3; worker += 1) work(app.deps, mail.url);
    await Promise.all(Array.from({ length: 20 }, () => queue()));
    await settled();
    const [sent, ids] = [await letters(), mail.letters.map((letter) => letter.messageId)];
    expect(sent.map((row) => row.state)).toEqual(Array(20).fill('sent'));
    expect([...ids].sort()).toEqual(sent.map((row) => `<${row.id}@ovenbird.test>`).sort());
  });

  test('is dropped when its reader has left the shop meanwhile', async () => {
    const gone = await makeMember(app.owner, { id: owner.shopId }, { role: 'painter' });
    await queue({ accountId: gone.accountId, toEmail: gone.email });
    await app.owner('membership').where({ id: gone.memberId }).update({ disabled_at: app.clock.now });
    const mail = await postOffice();
    work(app.deps, mail.url);
    expect((await settled()).map((row) => row.state)).toEqual(['dropped']);
    expect(mail.letters).toEqual([]);
  });

  test('goes out in the end when the mail server refuses, hangs up in the middle and then works', async () => {
    const answers: ('refuse' | 'hang up')[] = ['refuse', 'hang up', 'refuse', 'hang up'];
    const mail: MailServer = await postOffice({
      onMailFrom: (_address, _session, done) =>
        answers[0] === 'refuse'
          ? done(Object.assign(new Error('try later'), { responseCode: 451, gone: answers.shift() }))
          : done(),
      onRcptTo(_address, _session, done) {
        if (answers[0] !== 'hang up') return done();
        answers.shift();
        mail.hangUp();
      },
    });
    work(app.deps, mail.url);
    await queue();
    await mail.took(1);
    expect((await settled()).map((row) => row.state)).toEqual(['sent']);
    expect(answers).toEqual([]);
    expect(mail.letters).toHaveLength(1);
    expect(await app.owner('task').first('attempts')).toEqual({ attempts: 5 });
  });

  test('that cannot be delivered is given up after ten tries, and the owner sees why', async () => {
    const mail = await postOffice();
    await mail.close();
    open.pop();
    work(app.deps, mail.url);
    await queue();
    const [dead] = await settled();
    expect(dead?.state).toBe('dead');
    expect(await app.owner('task').first('attempts')).toEqual({ attempts: 10 });
    const agent = await signedIn(app, owner);
    const outbox = await agent.get(`/api/shops/${owner.shopId}/letters?state=dead`).expect(200);
    expect(outbox.body.letters).toMatchObject([{ to: owner.email, state: 'dead', sentAt: null }]);
    expect(outbox.body.letters[0].lastError).toContain('ECONNREFUSED');
  });

  test('to an address that does not exist is given up at once', async () => {
    const mail = await postOffice({
      onRcptTo: (_address, _session, done) => done(Object.assign(new Error('no such user'), { responseCode: 550 })),
    });
    work(app.deps, mail.url);
    await queue();
    expect((await settled()).map((row) => row.state)).toEqual(['dead']);
    expect(await app.owner('task').first('attempts')).toEqual({ attempts: 1 });
  });
});

describe('a task', () => {
  const put = (kind: 'run-plan' | 'prune' = 'run-plan') =>
    app.deps.db.transaction((trx) => enqueue(trx, { kind, key: randomUUID(), shopId: owner.shopId, payload: {} }));
  const lanes = [{ kinds: ['run-plan' as const], runners: 1 }];
  const task = () => app.owner<{ attempts: number; done_at: Date | null; dead_at: Date | null }>('task').first();
  const withPlan = (definition: TaskDefinition) => ({ registry: { 'run-plan': definition }, lanes });

  test('waits longer after each failure, never in step with others, at most an hour and a half', () => {
    const spread = (attempts: number) => Array.from({ length: 200 }, () => growingDelay(attempts) / 1000);
    for (const [attempts, seconds] of [
      [1, 10],
      [2, 20],
      [5, 160],
      [12, 3600],
    ] as const) {
      const delays = spread(attempts);
      expect(Math.min(...delays)).toBeGreaterThanOrEqual(seconds * 0.5);
      expect(Math.max(...delays)).toBeLessThanOrEqual(seconds * 1.5);
      expect(new Set(delays).size).toBeGreaterThan(100);
    }
  });

  test('tells when it is given up, once', async () => {
    const dead: string[] = [];
    const definition: TaskDefinition = {
      attempts: 3,
      run: () => Promise.reject(new Error('always')),
      onDead: async (_deps, _task, error) => void dead.push(error),
    };
    work(app.deps, 'smtp://127.0.0.1:1', withPlan(definition));
    await put();
    await eventually(task, (row) => row?.dead_at != null);
    expect(dead).toEqual(['always']);
    expect((await task())?.attempts).toBe(3);
  });

  test('that kills its worker each time is given up too', async () => {
    await put();
    await app.owner('task').update({ attempts: 3 });
    const ran: string[] = [];
    work(app.deps, 'smtp://127.0.0.1:1', withPlan({ attempts: 3, run: async () => void ran.push('ran') }));
    await eventually(task, (row) => row?.dead_at != null);
    expect(ran).toEqual([]);
  });

  test('is left to the next worker when this one is stopped, at once and uncounted as a failure', async () => {
    let begun = () => {};
    const started = new Promise<void>((resolve) => (begun = resolve));
    const stop = startTestWorker(app.deps, 'smtp://127.0.0.1:1', {
      ...withPlan({
        attempts: 3,
        run: (_deps, _task, signal) =>
          new Promise((_resolve, reject) => {
            signal.addEventListener('abort', () => reject(new Error('stopped')));
            begun();
          }),
      }),
    });
    await put();
    await started;
    await stop();
    expect(await task()).toMatchObject({ done_at: null, dead_at: null, last_error: null });
    work(app.deps, 'smtp://127.0.0.1:1', withPlan({ attempts: 3, run: async () => {} }));
    await eventually(task, (row) => row?.done_at != null);
  });

  test('with an error no try will cure is tried once', async () => {
    work(app.deps, 'smtp://127.0.0.1:1', withPlan({ attempts: 9, run: () => Promise.reject(new GiveUp('never')) }));
    await put();
    await eventually(task, (row) => row?.dead_at != null);
    expect((await task())?.attempts).toBe(1);
  });
});

describe('pruning', () => {
  test('is asked for once a day, however many workers ask', async () => {
    await Promise.all(Array.from({ length: 5 }, () => askForNightlyTasks(app.deps)));
    expect(await app.owner('task').orderBy('kind').select('kind', 'key')).toEqual([
      { kind: 'look-at-people', key: '2026-03-10' },
      { kind: 'prune', key: '2026-03-10' },
      { kind: 'sweep-files', key: '2026-03-10' },
    ]);
  });

  test('forgets what ran out and keeps what has not', async () => {
    const ago = (days: number) => new Date(app.clock.now.getTime() - days * 86_400_000);
    const session = (sid: string, expire: Date) => ({ sid, sess: '{}', expire });
    await app.owner('session').insert([session('old', ago(1)), session('new', ago(-1))]);
    const reset = (id: string, expires_at: Date) => ({
      id,
      kind: 'reset',
      email: owner.email,
      account_id: owner.accountId,
      expires_at,
    });
    const [oldLink, newLink] = [randomUUID(), randomUUID()];
    await app.owner('account_token').insert([reset(oldLink, ago(31)), reset(newLink, ago(29))]);
    const done = (key: string, done_at: Date) => ({ id: randomUUID(), kind: 'send-letter', key, done_at });
    await app.owner('task').insert([done('old', ago(15)), done('new', ago(13))]);
    await app.owner('rate_limit').insert([
      { key: 'old', points: 1, expire: ago(1).getTime() },
      { key: 'new', points: 1, expire: ago(-1).getTime() },
    ]);
    work(app.deps, 'smtp://127.0.0.1:1');
    await askForNightlyTasks(app.deps);
    await eventually(
      () => app.owner('task').where({ kind: 'prune' }).whereNotNull('done_at'),
      (rows) => rows.length === 1,
    );
    expect(await app.owner('session').whereIn('sid', ['old', 'new']).pluck('sid')).toEqual(['new']);
    expect(await app.owner('account_token').pluck('id')).toEqual([newLink]);
    expect(await app.owner('task').where({ kind: 'send-letter' }).pluck('key')).toEqual(['new']);
    expect(await app.owner('rate_limit').whereIn('key', ['old', 'new']).pluck('key')).toEqual(['new']);
  });
});
