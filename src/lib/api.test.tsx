import { afterEach, describe, expect, it, vi } from 'vitest';
import { readDay } from '#contracts/day.ts';
import { moveStage } from '#contracts/drafts.ts';
import { readSession, signIn, signOut } from '#contracts/session.ts';
import { apiError, fakeApi } from '#src/testing/fake-api.ts';
import { meAs, shopId } from '#src/testing/render-page.tsx';
import { ApiError } from './api-error.ts';
import { addressOf, call } from './api.ts';
import { connectionNow } from './connection.ts';

afterEach(() => vi.unstubAllGlobals());
const failing = async (promise: Promise<unknown>): Promise<ApiError> => {
  const error = await promise.then(
    () => null,
    (caught: unknown) => caught,
  );
  expect(error).toBeInstanceOf(ApiError);
  return error as ApiError;
};

describe('the address', () => {
  it('takes params and query, each made safe', () => {
    const address = addressOf(readDay.path, { shopId: 'a/b' }, { from: '2026-03-12T00:00:00+01:00', plan: undefined });
    expect(address).toBe('/api/shops/a%2Fb/day?from=2026-03-12T00%3A00%3A00%2B01%3A00');
  });
  it('is not made without its params', () => {
    expect(() => addressOf(readDay.path, {})).toThrow('lacks shopId');
  });
});

describe('a call', () => {
  it('sends a write as JSON with a key of its own, a read without', async () => {
    const { sent } = fakeApi({
      'POST /api/session': { body: meAs('lead') },
      'GET /api/session': { body: meAs('lead') },
    });
    const body = { email: 'imke@saltmarsh.example', password: 'x' };
    await call(signIn, { body });
    await call(signIn, { body });
    await call(readSession, {});
    expect(sent[0]).toMatchObject({ body });
    const keys = sent.map(({ headers }) => headers.get('idempotency-key'));
    expect(keys[0]).toMatch(/^[\w-]{36}$/);
    expect(keys[1]).not.toBe(keys[0]);
    expect(keys[2]).toBeNull();
  });
  it('repeats a deed under the key it is given', async () => {
    const { sent } = fakeApi({ 'DELETE /api/session': { status: 204 } });
    await call(signOut, { key: 'the-very-same-deed' });
    expect(sent[0]?.headers.get('idempotency-key')).toBe('the-very-same-deed');
  });
  it('answers nothing for 204', async () => {
    fakeApi({ 'DELETE /api/session': { status: 204 } });
    expect(await call(signOut, {})).toEqual({});
  });
  it('hands on code, reasons and what it is now', async () => {
    const refusal = { code: 'off-shift', rule: 8, stageId: null, ids: [], names: ['Ada'], at: [], minutes: [] };
    fakeApi({ [`POST /api/shops/${shopId}/draft/stages/s/move`]: apiError(422, 'refused', { reasons: [refusal] }) });
    const body = { version: 1, start: '2026-03-12T08:00:00Z', placeId: shopId };
    const error = await failing(call(moveStage, { params: { shopId, stageId: 's' }, body }));
    expect(error).toMatchObject({ code: 'refused', status: 422, reasons: [refusal], current: undefined });
  });
  it('tells how long to wait', async () => {
    fakeApi({ 'GET /api/session': { ...apiError(429, 'too-many'), headers: { 'retry-after': '30' } } });
    expect(await failing(call(readSession, {}))).toMatchObject({ code: 'too-many', retryAfterSeconds: 30 });
  });
  it('knows no answer from a foreign one, and the banner hears of it', async () => {
    fakeApi({ 'GET /api/session': 'unreachable' });
    expect(await failing(call(readSession, {}))).toMatchObject({ code: 'unreachable', status: 0 });
    expect(connectionNow().state).toBe('offline');
    vi.stubGlobal('fetch', async () => new Response('<h1>Bad gateway</h1>', { status: 502 }));
    expect(await failing(call(readSession, {}))).toMatchObject({ code: 'unreadable', status: 502 });
    expect(connectionNow().state).toBe('fine');
  });
  it('lets an abort through as what it is', async () => {
    vi.stubGlobal('fetch', async (_: string, init: RequestInit) => {
      init.signal?.throwIfAborted();
      return new Response();
    });
    const signal = AbortSignal.abort();
    await expect(call(readSession, { signal })).rejects.toMatchObject({ name: 'AbortError' });
    expect(connectionNow().state).toBe('fine');
  });
});
