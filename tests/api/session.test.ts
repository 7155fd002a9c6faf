import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { signedIn, stranger, testApp, type TestApp } from '../helpers/app.ts';
import { freshDatabase, type TestDatabase } from '../helpers/database.ts';
import { makeMember, makeShop } from '../helpers/factories.ts';

let database: TestDatabase;
let app: TestApp;
beforeAll(async () => {
  database = await freshDatabase();
  app = await testApp(database);
});
afterAll(async () => {
  await app.close();
  await database.drop();
});

describe('signing in', () => {
  test('answers with who it is and the shops they belong to', async () => {
    const shop = await makeShop(app.owner, { name: 'North Street' });
    const lead = await makeMember(app.owner, shop, { role: 'lead' });
    const agent = await signedIn(app, lead);
    const me = await agent.get('/api/session').expect(200);
    expect(me.body.account.email).toBe(lead.email);
    expect(me.body.shops).toEqual([
      { id: shop.id, name: 'North Street', timeZone: shop.timeZone, role: 'lead', personId: null },
    ]);
    expect(me.body.serverTime).toBe(app.clock.now.toISOString());
  });

  test('without a session nothing is told', async () => {
    const answer = await stranger(app).get('/api/session').expect(401);
    expect(answer.body).toEqual({ error: { code: 'not-signed-in' } });
  });
});
