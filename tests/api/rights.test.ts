import { v7 as uuid } from 'uuid';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Route } from '#server/http/route.ts';
import { createApp } from '#server/app.ts';
import { stranger, testApp, testDeps, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { aCoating, aDraft, anAttachment, aJob, aSheet, aShop } from '../helpers/factories-jobs.ts';
import { makeMember, makePerson, makeShop, type MadeMember } from '../helpers/factories.ts';
import { withForeignIds, type ForeignIds } from './foreign-ids.ts';
import { rights, who, type Who } from './rights-matrix.ts';

// The list of routes is needed to name the tests, before there is a database; nothing is asked of it here.
const { deps } = testDeps({ ownerUrl: '', url: 'postgres://127.0.0.1:1/none', drop: async () => {} });
const routes: readonly Route[] = createApp(deps).routes;

let database: TestDatabase;
let app: TestApp;
let shopId: string;
const cookies = new Map<Who, string>();
let foreign: ForeignIds;

beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
  const [shop, otherShop] = [await makeShop(app.owner), await aShop(app.deps.db)];
  shopId = shop.id;
  const members: Partial<Record<Who, MadeMember>> = {};
  for (const role of ['painter', 'office', 'lead', 'owner'] as const)
    members[role] = await makeMember(app.owner, shop, { role });
  members.otherOwner = await makeMember(app.owner, otherShop, { role: 'owner' });
  members.disabledMember = await makeMember(app.owner, shop, { role: 'owner' });
  members.disabledAccount = await makeMember(app.owner, shop, { role: 'owner' });
  for (const [name, { email, password }] of Object.entries(members)) {
    const answer = await stranger(app).post('/api/session').send({ email, password }).expect(200);
    cookies.set(name as Who, (answer.headers['set-cookie'] as unknown as string[])[0]?.split(';', 1)[0] ?? '');
  }
  const disabled_at = app.clock.now;
  await app.owner('membership').where({ id: members.disabledMember.memberId }).update({ disabled_at });
  await app.owner('account').where({ id: members.disabledAccount.accountId }).update({ disabled_at });
  await aDraft(app.deps.db, shop);
  foreign = await rowsOf(otherShop, members.otherOwner.memberId);
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

async function rowsOf(shop: { id: string; booth: string; lamp: string }, memberId: string): Promise<ForeignIds> {
  const job = await aJob(app.deps.db, shop);
  const runId = uuid();
  const [zoneId, keyId] = [uuid(), uuid()];
  await app.owner('zone').insert({ shop_id: shop.id, id: zoneId, name: 'Zone' });
  await app
    .owner('api_key')
    .insert({ shop_id: shop.id, id: keyId, label: 'Logger', hint: 'abcdef', token_hash: Buffer.from('hash') });
  await app.owner('plan_run').insert({ shop_id: shop.id, id: runId, scope: 'all', seed: 1, seconds: 5 });
  return {
    jobId: job.id,
    stageId: job.stages[0] ?? '',
    memberId,
    runId,
    sheetId: await aSheet(app.deps.db, shop),
    placeId: shop.booth,
    personId: (await makePerson(app.owner, shop)).id,
    zoneId,
    keyId,
    traceId: await aTrace(shop, job.stages[0] ?? ''),
    coatingId: await aCoating(app.deps.db, shop),
    attachmentId: await anAttachment(app.deps.db, shop),
    ...(await setUpOf(shop)),
  };
}

/** Lamps, hours and filters of another shop. */
async function setUpOf(shop: { id: string; booth: string; lamp: string }) {
  const [closureId, filterId, entryId] = [uuid(), uuid(), uuid()];
  const inIt = { shop_id: shop.id };
  const circuit = await app.owner('circuit').where(inIt).first<{ id: string }>('id');
  const opening = await app.owner('opening').where(inIt).first<{ id: string }>('id');
  await app
    .owner('closure')
    .insert({ ...inIt, id: closureId, kind: 'closure', starts_local: '2026-03-11T07:00', minutes: 60 });
  await app.owner('filter').insert({ ...inIt, id: filterId, place_id: shop.booth, name: 'Exhaust' });
  await app
    .owner('filter_entry')
    .insert({ ...inIt, id: entryId, filter_id: filterId, kind: 'change', at: app.clock.now });
  return { lampId: shop.lamp, circuitId: circuit.id, openingId: opening.id, closureId, filterId, entryId };
}

async function aTrace(shop: { id: string }, stageId: string): Promise<string> {
  const id = uuid();
  const made = {
    file_name: 'bake.csv',
    file: Buffer.from(''),
    settings: '{}',
    points: '[]',
    verdict: '{}',
    curve: '[]',
  };
  await app.owner('bake_trace').insert({ shop_id: shop.id, id, stage_id: stageId, ...made });
  return id;
}

type Sent = { method: string; body?: object | undefined };
async function ask(path: string, { method, body }: Sent, as: Who) {
  const stop = new AbortController();
  const cookie = cookies.get(as);
  const answer = await fetch(`${app.url}${path}`, {
    method,
    signal: stop.signal,
    headers: { ...(cookie && { Cookie: cookie }), ...(body && { 'Content-Type': 'application/json' }) },
    ...(body && { body: JSON.stringify(body) }),
  });
  const isStream = answer.headers.get('content-type')?.startsWith('text/event-stream');
  const text = isStream ? 'a stream' : await answer.text();
  stop.abort();
  return { status: answer.status, text };
}

/** The route's path with these ids, and ids of nothing for the others. */
const filled = (path: string, ids: Record<string, string>): string =>
  path.replace(/:(\w+)/g, (_, name: string) => ids[name] ?? uuid());

test('every route has a row and every row a route', () => {
  const named = routes.map((route) => route.name);
  expect(new Set(named).size, 'two routes of one name').toBe(named.length);
  for (const name of named)
    expect(rights[name], `route ${name} has no row in tests/api/rights-matrix.ts`).toBeDefined();
  for (const name of Object.keys(rights))
    expect(named, `tests/api/rights-matrix.ts has a row for ${name}, which is no route`).toContain(name);
});

describe('the door of each route', () => {
  // Strict schemas refuse a query or a field they do not know, so whoever is let in changes nothing.
  const nonsense = { nonsense: true };
  test.each(routes.map((route) => [route.name, route] as const))('%s', async (name, route) => {
    const row = rights[name];
    if (!row) throw new Error(`route ${name} has no row in tests/api/rights-matrix.ts`);
    const path = filled(route.path, { shopId });
    const found: Partial<Record<Who, unknown>> = {};
    for (const one of who) {
      const isGet = route.method === 'GET';
      const sent = isGet ? { method: 'GET' } : { method: route.method, body: nonsense };
      const { status, text } = await ask(isGet ? `${path}?nonsense=1` : path, sent, one);
      found[one] = status === 400 || text === 'a stream' ? 'may' : status;
    }
    expect(found).toEqual(row);
  });
});

describe("another shop's ids are ids of nothing", () => {
  const takesIds = routes.filter(
    (route) => (route.path.includes(':shopId/') && /:(?!shopId)/.test(route.path)) || route.name in withForeignIds,
  );
  test.each(takesIds.map((route) => [route.name, route] as const))('%s', async (name, route) => {
    const request = withForeignIds[name];
    if (!request) throw new Error(`route ${name} has no request in tests/api/foreign-ids.ts`);
    const send = (ids: ForeignIds) => {
      const { body, query = '' } = request(ids);
      return ask(`${filled(route.path, { ...ids, shopId })}${query}`, { method: route.method, body }, 'owner');
    };
    const ofNothing = Object.fromEntries(Object.keys(foreign).map((key) => [key, uuid()])) as ForeignIds;
    const [theirs, nothing] = [await send(foreign), await send(ofNothing)];
    expect(theirs).toEqual(nothing);
    expect(theirs.status).toBeGreaterThanOrEqual(400);
    expect(theirs.status).toBeLessThan(500);
  });

  test('and another shop is no shop, to the byte', async () => {
    const theirs = await app.owner('shop').whereNot({ id: shopId }).first<{ id: string }>('id');
    for (const route of routes.filter(({ path }) => path.includes(':shopId'))) {
      const sent = { method: route.method, body: route.method === 'GET' ? undefined : {} };
      const [other, none] = await Promise.all(
        [theirs.id, uuid()].map((id) => ask(filled(route.path, { ...foreign, shopId: id }), sent, 'owner')),
      );
      expect(other).toEqual({ status: 404, text: '{"error":{"code":"not-found"}}' });
      expect(none).toEqual(other);
    }
  });
});

test('a changed role counts at the next request', async () => {
  const member = await makeMember(app.owner, { id: shopId }, { role: 'owner' });
  const { email, password } = member;
  const agent = stranger(app);
  await agent.post('/api/session').send({ email, password }).expect(200);
  await agent.get(`/api/shops/${shopId}/members`).expect(200);
  await app.owner('membership').where({ id: member.memberId }).update({ role: 'painter' });
  const answer = await agent.get(`/api/shops/${shopId}/members`).expect(403);
  expect(answer.body).toEqual({ error: { code: 'forbidden' } });
});
