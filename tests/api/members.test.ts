import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { signedIn, testApp, type Agent, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop, type MadeMember } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
let owner: MadeMember;
let painter: MadeMember;
let agent: Agent;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
beforeEach(async () => {
  const shop = await makeShop(app.owner);
  owner = await makeMember(app.owner, shop, { role: 'owner', name: 'Olive' });
  painter = await makeMember(app.owner, shop, { role: 'painter', name: 'Pat' });
  agent = await signedIn(app, owner);
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

const change = (member: MadeMember, body: object) =>
  agent.patch(`/api/shops/${owner.shopId}/members/${member.memberId}`).send(body);

test('the list names members by name and open invitations, of this shop only', async () => {
  await makeMember(app.owner, await makeShop(app.owner), { role: 'owner' });
  const invited = { email: 'new@shop.test', role: 'office', personId: null };
  await agent.post(`/api/shops/${owner.shopId}/invitations`).send(invited).expect(200);
  const { body } = await agent.get(`/api/shops/${owner.shopId}/members`).expect(200);
  expect(body.members).toMatchObject([{ name: 'Olive' }, { name: 'Pat' }]);
  expect(body.invitations).toMatchObject([
    {
      email: 'new@shop.test',
      role: 'office',
      expiresAt: new Date(app.clock.now.getTime() + 604_800_000).toISOString(),
    },
  ]);
});

describe('changing a member', () => {
  test('gives another role, which counts at once, and is on record', async () => {
    const theirs = await signedIn(app, painter);
    await theirs.get(`/api/shops/${owner.shopId}/members`).expect(403);
    const answer = await change(painter, { role: 'owner' }).expect(200);
    expect(answer.body).toMatchObject({ id: painter.memberId, role: 'owner', disabled: false });
    await theirs.get(`/api/shops/${owner.shopId}/members`).expect(200);
    const [recorded] = await app.owner('change').where({ shop_id: owner.shopId, kind: 'member-changed' });
    expect(recorded).toMatchObject({
      account_id: owner.accountId,
      ids: [painter.accountId],
      detail: { before: { role: 'painter', disabled: false }, after: { role: 'owner', disabled: false } },
    });
  });

  test('to what it is already writes nothing', async () => {
    await change(painter, { role: 'painter' }).expect(200);
    await change(painter, {}).expect(200);
    expect(await app.owner('change').where({ shop_id: owner.shopId })).toEqual([]);
  });

  test('puts one out at once and lets it in again', async () => {
    const theirs = await signedIn(app, painter);
    await change(painter, { disabled: true }).expect(200);
    await theirs.get(`/api/shops/${owner.shopId}/jobs`).expect(404);
    expect((await theirs.get('/api/session').expect(200)).body.shops).toEqual([]);
    await change(painter, { disabled: false }).expect(200);
    await theirs.get(`/api/shops/${owner.shopId}/jobs`).expect(200);
  });

  test.each([{ role: 'lead' }, { disabled: true }])('leaves the last owner: %j is refused', async (body) => {
    const answer = await change(owner, body).expect(422);
    expect(answer.body.error).toMatchObject({
      code: 'refused',
      reasons: [{ code: 'last-owner', ids: [owner.memberId], names: ['Olive'] }],
    });
    await agent.get(`/api/shops/${owner.shopId}/members`).expect(200);
  });

  test('two owners who put each other out at the same time: one of them stays', async () => {
    for (let round = 0; round < 5; round += 1) {
      const shop = await makeShop(app.owner);
      const [one, two] = [
        await makeMember(app.owner, shop, { role: 'owner' }),
        await makeMember(app.owner, shop, { role: 'owner' }),
      ];
      const [first, second] = [await signedIn(app, one), await signedIn(app, two)];
      await Promise.all([
        first.patch(`/api/shops/${shop.id}/members/${two.memberId}`).send({ disabled: true }),
        second.patch(`/api/shops/${shop.id}/members/${one.memberId}`).send({ disabled: true }),
      ]);
      const left = await app.owner('membership').where({ shop_id: shop.id, role: 'owner' }).whereNull('disabled_at');
      expect(left).toHaveLength(1);
    }
  });
});
