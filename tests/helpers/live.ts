import { request, type IncomingMessage } from 'node:http';
import type { TestApp } from './app.ts';

export type StreamEvent = { event: string; id: string | null; data: string };

export type LiveClient = {
  status: number;
  headers: IncomingMessage['headers'];
  /** The next event, or `'closed'` when the server ends the stream. Fails after five seconds: that is the promise. */
  next(): Promise<StreamEvent | 'closed'>;
  /** Last-Event-ID as a browser keeps it. */
  lastId(): string | null;
  close(): void;
};

/** A reader of server-sent events that does what a browser's does (WHATWG HTML, 9.2), but for connecting again. */
export async function openLive(
  app: TestApp,
  given: { shopId: string; cookie: string; lastId?: string | null },
): Promise<LiveClient> {
  const sent = request(`${app.url}/api/shops/${given.shopId}/live`, {
    headers: { Cookie: given.cookie, ...(given.lastId != null && { 'Last-Event-ID': given.lastId }) },
    agent: false,
  }).end();
  const answer = await new Promise<IncomingMessage>((resolve, reject) => {
    sent.on('response', resolve).on('error', reject);
  });
  sent.on('error', () => undefined);
  let [rest, id] = ['', null as string | null];
  const events: (StreamEvent | 'closed')[] = [];
  let wake = () => {};
  const push = (event: StreamEvent | 'closed') => {
    events.push(event);
    wake();
  };
  answer.setEncoding('utf8').on('data', (chunk: string) => {
    const blocks = (rest + chunk).split('\n\n');
    rest = blocks.pop() ?? '';
    for (const block of blocks) {
      const fields = new Map(block.split('\n').map((line) => line.split(/: ?(.*)/s, 2) as [string, string]));
      id = fields.get('id') ?? id;
      const data = fields.get('data');
      if (data !== undefined) push({ event: fields.get('event') ?? 'message', id, data });
    }
  });
  answer.on('close', () => push('closed')).on('error', () => undefined);
  return {
    status: answer.statusCode ?? 0,
    headers: answer.headers,
    lastId: () => id,
    close: () => sent.destroy(),
    async next() {
      if (events.length === 0)
        await new Promise<void>((resolve, reject) => {
          const late = setTimeout(() => reject(new Error('nothing came within five seconds')), 5_000);
          wake = () => {
            clearTimeout(late);
            resolve();
          };
        });
      return events.shift() ?? 'closed';
    },
  };
}
