import { createHash, randomUUID } from 'node:crypto';
import { once } from 'node:events';
import { readdirSync } from 'node:fs';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { keyOf, type Storage } from '#server/storage/storage.ts';
import { sweepFiles } from '../../jobs/tasks/sweep-files.ts';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aCoating } from '../helpers/factories-jobs.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';
import { tempStorage } from '../helpers/storage.ts';

const MEGABYTE = 1_048_576;
/** As small as a PDF may be told by its first bytes (ISO 32000-1, 7.5.2). */
const pdf = (text = 'sheet') => Buffer.from(`%PDF-1.7\n1 0 obj\n<< /Title (${text}) >>\nendobj\n%%EOF\n`);

let database: TestDatabase;
let app: TestApp;
let shop: { id: string };
let lead: Agent;
let painter: Agent;
let coating: string;
const broken: { put?: boolean } = {};
const inner = tempStorage();
const storage: Storage = {
  ...inner,
  put: (...given) => (broken.put ? Promise.reject(new Error('disk full')) : inner.put(...given)),
};
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database, { deps: { storage }, env: { SHOP_FILES: '3', SHOP_FILES_MB: '20' } });
});
afterAll(async () => {
  await app.close();
  await database.drop();
});
beforeEach(async () => {
  delete broken.put;
  shop = await makeShop(app.owner);
  lead = await signedIn(app, await makeMember(app.owner, shop, { role: 'lead' }));
  painter = await signedIn(app, await makeMember(app.owner, shop, { role: 'painter' }));
  coating = await aCoating(app.deps.db, shop);
});

const at = (id = coating, shopId = shop.id) => `/api/shops/${shopId}/coatings/${id}/document`;
type Sending = { as?: Agent; name?: string; key?: string; to?: string; type?: string };
const send = (bytes: Buffer, { as = lead, name = 'sheet.pdf', key = randomUUID(), to = at(), type }: Sending = {}) =>
  as
    .post(to)
    .set('Idempotency-Key', key)
    .attach('file', bytes, { filename: name, ...(type === undefined ? {} : { contentType: type }) });
const keys = async (): Promise<string[]> => {
  const found: string[] = [];
  for await (const { key } of storage.list()) if (key.includes(shop.id)) found.push(key);
  return found;
};
const uploads = () => readdirSync(tmpdir()).filter((name) => name.startsWith('ovenbird-upload-'));
const rows = () => app.owner('attachment').where({ shop_id: shop.id }).orderBy('created_at');

describe('the maker’s sheet', () => {
  test('is kept byte for byte, shown by everybody of the shop, replaced and taken off', async () => {
    const first = pdf('first');
    const { body } = await send(first).expect(200);
    expect(body).toMatchObject({ id: coating, version: 1 });
    expect(body.document).toMatchObject({ name: 'sheet.pdf', bytes: first.length, mime: 'application/pdf' });
    const [row] = await rows();
    expect(row.sha256).toEqual(createHash('sha256').update(first).digest());
    const path = `/api/shops/${shop.id}/attachments/${body.document.id}`;
    const got = await painter.get(path).buffer().expect(200);
    expect(Buffer.from(got.body as Buffer).equals(first)).toBe(true);
    expect(got.headers).toMatchObject({
      'content-type': 'application/pdf',
      'content-disposition': 'attachment; filename="sheet.pdf"',
      'cache-control': 'private, max-age=3600',
      'x-content-type-options': 'nosniff',
      'cross-origin-resource-policy': 'same-origin',
    });
    expect((await painter.get(`${path}?open=1`).expect(200)).headers['content-disposition']).toMatch(/^inline;/);

    const { body: second } = await send(pdf('second'), { name: 'second.PDF' }).expect(200);
    expect(second.document.name).toBe('second.PDF');
    await painter.get(path).expect(404);
    expect((await lead.delete(at()).expect(200)).body.document).toBeNull();
    expect((await lead.delete(at()).expect(200)).body.document).toBeNull();
    expect((await rows()).map(({ removed_at }) => removed_at !== null)).toEqual([true, true]);
    expect(uploads()).toEqual([]);
  });

  test('sent five times with one key, two at once, is one file; with another content the key is refused', async () => {
    const same = { key: 'one-file-only' };
    const two = await Promise.all([send(pdf(), same), send(pdf(), same)]);
    const answers = [...two, await send(pdf(), same), await send(pdf(), same), await send(pdf(), same)];
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200, 200, 200]);
    expect(new Set(answers.map(({ body }) => body.document.id)).size).toBe(1);
    expect([(await rows()).length, (await keys()).length]).toEqual([1, 1]);
    expect((await send(pdf('other'), same).expect(409)).body.error.code).toBe('key-reused');
  });

  test('is nobody else’s: another shop’s coating, another shop’s file, a painter, a stranger', async () => {
    const other = await makeShop(app.owner);
    const theirLead = await signedIn(app, await makeMember(app.owner, other, { role: 'lead' }));
    const theirs = await aCoating(app.deps.db, other);
    const theirFile = (await send(pdf(), { as: theirLead, to: at(theirs, other.id) }).expect(200)).body.document.id;
    const nothing = await send(pdf(), { to: at(randomUUID()) }).expect(404);
    expect((await send(pdf(), { to: at(theirs) }).expect(404)).body).toEqual(nothing.body);
    await send(pdf(), { to: at(theirs, other.id) }).expect(404);
    await lead.get(`/api/shops/${shop.id}/attachments/${theirFile}`).expect(404);
    await lead.get(`/api/shops/${other.id}/attachments/${theirFile}`).expect(404);
    await send(pdf(), { as: painter }).expect(403);
    expect([await keys(), uploads()]).toEqual([[], []]);
  });
});

describe('what is not taken', () => {
  test.each<[string, () => Buffer, Sending, number]>([
    ['a program called .pdf', () => Buffer.from('MZ\x90\x00\x03 and so on'.padEnd(400, '\0')), {}, 415],
    [
      'a page called .pdf and said to be one',
      () => Buffer.from('<html><script>1</script>'),
      { type: 'application/pdf' },
      415,
    ],
    ['a drawing with scripts', () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>'), { name: 'a.svg' }, 415],
    ['a picture, here', () => Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'), { name: 'a.png' }, 415],
    ['a PDF called .exe', () => pdf(), { name: 'sheet.exe' }, 415],
    ['nothing at all', () => Buffer.alloc(0), {}, 400],
    ['a byte too much', () => Buffer.concat([pdf(), Buffer.alloc(10 * MEGABYTE + 1 - pdf().length)]), {}, 413],
  ])('%s', async (_, bytes, sending, status) => {
    const { body } = await send(bytes(), sending).expect(status);
    expect(body.error.code).toBe({ 400: 'bad-request', 413: 'too-large', 415: 'wrong-kind' }[status]);
    expect([await keys(), await rows(), uploads()]).toEqual([[], [], []]);
  });
  test('but exactly the most is', async () => {
    await send(Buffer.concat([pdf(), Buffer.alloc(10 * MEGABYTE - pdf().length)])).expect(200);
  });

  test('ten thousand fields, a second file, a field of another name', async () => {
    const many = lead.post(at()).set('Idempotency-Key', randomUUID());
    for (let i = 0; i < 10_000; i++) void many.field(`field${i}`, 'x');
    await many.attach('file', pdf(), 'sheet.pdf').expect(400);
    const second = lead.post(at()).set('Idempotency-Key', randomUUID());
    await second.attach('file', pdf(), 'a.pdf').attach('file', pdf(), 'b.pdf').expect(400);
    await lead.post(at()).set('Idempotency-Key', randomUUID()).attach('other', pdf(), 'a.pdf').expect(400);
    expect([await keys(), await rows(), uploads()]).toEqual([[], [], []]);
  });

  test('a form without a header of our own, or from another site: what a page elsewhere could send', async () => {
    await lead.post(at()).attach('file', pdf(), 'sheet.pdf').expect(400);
    await send(pdf()).set('Sec-Fetch-Site', 'cross-site').expect(403);
    await send(pdf()).set('Origin', 'http://elsewhere.test').expect(403);
    await lead.post(at()).set('Idempotency-Key', randomUUID()).send({ file: 'x' }).expect(400);
    expect(await keys()).toEqual([]);
  });

  test('a form cut off in the middle, whole in length or not', async () => {
    const boundary = 'cut';
    const head = `--${boundary}\r\nContent-Disposition: form-data; name="file"; filename="a.pdf"\r\n\r\n${String(pdf())}`;
    const torn = await lead
      .post(at())
      .set('Idempotency-Key', randomUUID())
      .set('Content-Type', `multipart/form-data; boundary=${boundary}`)
      .send(head)
      .expect(400);
    expect(torn.body.error.fields).toEqual([{ path: 'body.file', message: 'the form is torn' }]);

    // A line that drops: the server has nobody to answer, and nothing is left.
    const { jar } = lead as unknown as { jar: { getCookies(of: object): { toValueString(): string } } };
    const cookies = jar.getCookies({ domain: '127.0.0.1', path: '/', secure: false, script: false });
    const { hostname, port } = new URL(app.url);
    const line = connect(Number(port), hostname);
    await once(line, 'connect');
    const headers = [
      `POST ${at()} HTTP/1.1`,
      `Host: ${hostname}:${port}`,
      `Cookie: ${cookies.toValueString()}`,
      `Idempotency-Key: ${randomUUID()}`,
      `Content-Type: multipart/form-data; boundary=${boundary}`,
      'Content-Length: 500000',
    ];
    line.write(`${headers.join('\r\n')}\r\n\r\n${head}`);
    await expect.poll(uploads, { timeout: 10_000 }).toHaveLength(1);
    line.destroy();
    await expect.poll(uploads, { timeout: 10_000 }).toEqual([]);
    expect([await keys(), await rows()]).toEqual([[], []]);
    await lead.get(`/api/shops/${shop.id}/coatings`).expect(200);
  });
});

test.each([
  ['../../etc/passwd.pdf', 'passwd.pdf', 'attachment; filename="passwd.pdf"'],
  ['C:\\sheets\\clear.pdf', 'clear.pdf', 'attachment; filename="clear.pdf"'],
  ['a\r\nSet-Cookie: x=1.pdf', 'aSet-Cookie_ x=1.pdf', 'attachment; filename="aSet-Cookie_ x=1.pdf"'],
  // A letter that turns what follows: shown as "sheet-fdp.exe" it would look like what it is not.
  ['sheet-\u202eexe.pdf', 'sheet-exe.pdf', 'attachment; filename="sheet-exe.pdf"'],
  ['no ending', 'no ending.pdf', 'attachment; filename="no ending.pdf"'],
  // RFC 8187, 3.2.3: pound and euro rates.
  [
    '£ and € rates.pdf',
    '£ and € rates.pdf',
    `attachment; filename="_ and _ rates.pdf"; filename*=UTF-8''%C2%A3%20and%20%E2%82%AC%20rates.pdf`,
  ],
  [
    `${'long '.repeat(60)}.pdf`,
    `${'long '.repeat(60).slice(0, 116)}.pdf`,
    `attachment; filename="${'long '.repeat(60).slice(0, 116)}.pdf"`,
  ],
])('the name %j is shown as %j', async (given, shown, header) => {
  const { body } = await send(pdf(), { name: given }).expect(200);
  expect(body.document.name).toBe(shown);
  const got = await lead.get(`/api/shops/${shop.id}/attachments/${body.document.id}`).expect(200);
  expect(got.headers['content-disposition']).toBe(header);
});

describe('room', () => {
  test('is a shop’s own, by count and by bytes; what was replaced does not count', async () => {
    const big = Buffer.concat([pdf(), Buffer.alloc(9 * MEGABYTE)]);
    const coatings = [coating];
    for (const name of ['B', 'C', 'D']) coatings.push(await aCoating(app.deps.db, shop, { name }));
    const [a = '', b = '', c = '', d = ''] = coatings;
    await send(big, { to: at(a) }).expect(200);
    await send(big, { to: at(b) }).expect(200);
    const full = await send(big, { to: at(c) }).expect(413);
    expect(full.body.error.fields).toEqual([{ path: 'body.file', message: 'the room for files is used up' }]);
    await send(big, { to: at(b) }).expect(200);
    await send(pdf(), { to: at(c) }).expect(200);
    await send(pdf(), { to: at(d) }).expect(413);
    // Nothing of what was refused stays; the replaced one goes later.
    expect(await keys()).toHaveLength(4);
  });
});

describe('bytes and rows', () => {
  test('a store that fails leaves no row, a transaction that fails leaves no bytes', async () => {
    broken.put = true;
    await send(pdf()).expect(500);
    expect([await rows(), await keys()]).toEqual([[], []]);
    delete broken.put;
    await app.owner.raw(`alter table change add constraint no_more check (kind <> 'sheets-changed') not valid`);
    try {
      await send(pdf()).expect(500);
    } finally {
      await app.owner.raw('alter table change drop constraint no_more');
    }
    expect([await rows(), await keys(), uploads()]).toEqual([[], [], []]);
    await send(pdf()).expect(200);
  });

  test('the nightly sweep takes what has no row and is older than a day, or was taken off a month ago', async () => {
    const kept = (await send(pdf()).expect(200)).body.document.id as string;
    const stray = randomUUID();
    await storage.put(keyOf(shop.id, stray), Readable.from([pdf()]), { bytes: pdf().length, mime: 'application/pdf' });
    const left = async () => (await keys()).map((key) => key.slice(-36)).sort();
    const task = { id: randomUUID(), kind: 'sweep-files' as const, shopId: null, payload: {}, attempts: 1 };
    const sweepIn = (days: number) =>
      sweepFiles(
        { ...app.deps, mailer: null, now: () => new Date(Date.now() + days * 86_400_000) },
        task,
        new AbortController().signal,
      );
    await sweepIn(0.9);
    expect(await left()).toEqual([kept, stray].sort());
    await sweepIn(1.1);
    await sweepIn(1.1);
    expect(await left()).toEqual([kept]);
    await app.owner('attachment').where({ id: kept }).update({ removed_at: new Date() });
    await sweepIn(29);
    expect(await left()).toEqual([kept]);
    await sweepIn(31);
    expect(await left()).toEqual([]);
  });
});
