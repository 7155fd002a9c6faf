import { vi } from 'vitest';

export type Sent = { method: string; path: string; query: URLSearchParams; body: unknown; headers: Headers };
type Answer = { status?: number; body?: unknown; headers?: Record<string, string> } | 'unreachable';

/**
 * Stands in for the server: answers by `METHOD /path` and keeps what was sent. A request that nobody expected fails the
 * test by its answer, 501.
 */
export function fakeApi(answers: Record<string, Answer | ((sent: Sent) => Answer | Promise<Answer>)>) {
  const sent: Sent[] = [];
  vi.stubGlobal('fetch', async (input: string, init: RequestInit = {}) => {
    const url = new URL(input, 'http://here');
    const one: Sent = {
      method: init.method ?? 'GET',
      path: url.pathname,
      query: url.searchParams,
      body: typeof init.body === 'string' ? JSON.parse(init.body) : undefined,
      headers: new Headers(init.headers),
    };
    sent.push(one);
    const given = answers[`${one.method} ${one.path}`];
    const answer = typeof given === 'function' ? await given(one) : (given ?? { status: 501 });
    if (answer === 'unreachable') throw new TypeError('Failed to fetch');
    const { status = 200, body, headers = {} } = answer;
    return new Response(body === undefined ? null : JSON.stringify(body), { status, headers });
  });
  return { sent };
}

export const apiError = (status: number, code: string, more: object = {}) => ({
  status,
  body: { error: { code, ...more } },
});
