import { QueryClient } from '@tanstack/react-query';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { changeKind } from '#contracts/live.ts';
import { fakeApi } from '#src/testing/fake-api.ts';
import { meAs, shopId } from '#src/testing/render-page.tsx';
import { connectionNow } from './connection.ts';
import { openLive } from './live.ts';
import { shopKey, topicsOf } from './query-keys.ts';

class FakeSource extends EventTarget {
  static CLOSED = 2;
  static all: FakeSource[] = [];
  readyState = 0;
  readonly url: string;
  constructor(url: string) {
    super();
    this.url = url;
    FakeSource.all.push(this);
  }
  close(): void {
    this.readyState = 2;
  }
  tell(type: string, data?: unknown): void {
    this.dispatchEvent(data === undefined ? new Event(type) : new MessageEvent(type, { data: JSON.stringify(data) }));
  }
}
const last = () => FakeSource.all.at(-1)!;

let client: QueryClient;
let stop: () => void;
const invalidated = () => {
  const keys = vi.mocked(client.invalidateQueries).mock.calls.map(([filter]) => filter?.queryKey);
  vi.mocked(client.invalidateQueries).mockClear();
  return keys;
};

beforeEach(() => {
  vi.useFakeTimers();
  FakeSource.all = [];
  vi.stubGlobal('EventSource', FakeSource);
  client = new QueryClient();
  vi.spyOn(client, 'invalidateQueries').mockResolvedValue();
  stop = openLive(client, shopId);
  last().tell('open');
});
afterEach(() => {
  stop();
  vi.useRealTimers();
  vi.unstubAllGlobals();
});
const notice = (kind: string, seq = 1) => ({ seq, kind, ids: [] });

describe('live notices', () => {
  it('listen in the shop', () => {
    expect(last().url).toBe(`/api/shops/${shopId}/live`);
  });
  it('have what a change concerns fetched again, once for notices that come together', () => {
    last().tell('change', notice('draft-changed', 1));
    last().tell('change', notice('draft-changed', 2));
    expect(invalidated()).toEqual([]);
    vi.advanceTimersByTime(100);
    expect(invalidated()).toEqual([shopKey(shopId, 'day'), shopKey(shopId, 'draft')]);
  });
  it('have everything fetched again after a gap, and for a kind they do not know', () => {
    last().tell('gap', { seq: 9 });
    last().tell('change', notice('brand-new-kind'));
    expect(invalidated()).toEqual([[shopId], [shopId]]);
  });
  it('know what each kind of change concerns', () => {
    expect(Object.keys(topicsOf).sort()).toEqual([...changeKind.options].sort());
  });
});

describe('a stream that breaks', () => {
  it('says so within 3 s, and catches up when it is back', async () => {
    fakeApi({ 'GET /api/health': 'unreachable' });
    last().tell('error');
    expect(connectionNow().state).toBe('fine');
    await vi.advanceTimersByTimeAsync(3_000);
    expect(connectionNow().state).toBe('offline');
    last().tell('open');
    expect(connectionNow().state).toBe('fine');
    expect(invalidated()).toEqual([[shopId]]);
  });
  it('tells a deaf page from a lost server', async () => {
    fakeApi({ 'GET /api/health': { body: { status: 'ok' } } });
    last().tell('error');
    await vi.advanceTimersByTimeAsync(3_000);
    expect(connectionNow().state).toBe('lagging');
  });
  it('is nothing where it is back at once', async () => {
    last().tell('error');
    await vi.advanceTimersByTimeAsync(1_000);
    last().tell('open');
    await vi.advanceTimersByTimeAsync(5_000);
    expect(connectionNow().state).toBe('fine');
    expect(invalidated()).toEqual([]);
  });
  it('is opened again where the answer closed it for good', async () => {
    fakeApi({ 'GET /api/health': { body: { status: 'ok' } } });
    last().readyState = FakeSource.CLOSED;
    last().tell('error');
    await vi.advanceTimersByTimeAsync(2_100);
    expect(FakeSource.all).toHaveLength(2);
  });
  it('asks who is signed in when it is sent away, and listens on where somebody is', async () => {
    fakeApi({ 'GET /api/session': { body: meAs('painter') } });
    last().tell('bye', {});
    await vi.advanceTimersByTimeAsync(1_100);
    expect(client.getQueryData(['me'])).toMatchObject({ shops: [{ role: 'painter' }] });
    expect(FakeSource.all).toHaveLength(2);
  });
  it('waits for the answer to a write, which may bring a new session', async () => {
    const { sent } = fakeApi({ 'GET /api/session': { body: meAs('painter') } });
    const writes = vi.spyOn(client, 'isMutating').mockReturnValue(1);
    last().tell('bye', {});
    await vi.advanceTimersByTimeAsync(5_000);
    expect(sent).toEqual([]);
    writes.mockReturnValue(0);
    await vi.advanceTimersByTimeAsync(1_100);
    expect(sent).toHaveLength(1);
  });
  it('stays shut where nobody is', async () => {
    fakeApi({ 'GET /api/session': { status: 401, body: { error: { code: 'not-signed-in' } } } });
    last().tell('bye', {});
    await vi.advanceTimersByTimeAsync(60_000);
    expect(client.getQueryData(['me'])).toBeNull();
    expect(FakeSource.all).toHaveLength(1);
  });
});

describe('a tab out of sight', () => {
  const setHidden = (hidden: boolean) => {
    vi.spyOn(document, 'hidden', 'get').mockReturnValue(hidden);
    document.dispatchEvent(new Event('visibilitychange'));
  };
  it('lets its stream go and catches up when it is looked at', () => {
    setHidden(true);
    vi.advanceTimersByTime(31_000);
    expect(last().readyState).toBe(FakeSource.CLOSED);
    setHidden(false);
    expect(FakeSource.all).toHaveLength(2);
    last().tell('open');
    expect(invalidated()).toEqual([[shopId]]);
  });
});
