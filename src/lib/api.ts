import { v7 } from 'uuid';
import type * as z from 'zod';
import type { Upload } from '#contracts/attachments.ts';
import type { Endpoint, ReplyOf } from '#contracts/endpoint.ts';
import { nothing } from '#contracts/endpoint.ts';
import { errorReply } from '#contracts/reasons.ts';
import { ApiError } from './api-error.ts';
import { reached } from './connection.ts';

type Given<Name extends string, T> = Record<never, never> extends T ? { [N in Name]?: T } : { [N in Name]: T };

/** What an endpoint is called with: its params, query and body, each needed only where something in it is. */
export type CallInput<E extends Endpoint> = Given<'params', z.input<E['params']>> &
  Given<'query', z.input<E['query']>> &
  Given<'body', z.input<E['body']>> & {
    signal?: AbortSignal;
    /** Name of this very deed: sent again with the same key it is done once. Made anew for each write where absent. */
    key?: string;
  };

/**
 * The only fetch of the program.
 * @throws {ApiError} for every answer that is no success, and for none at all
 * @throws the signal's reason where it was used to stop the call
 */
export async function call<E extends Endpoint>(endpoint: E, input: CallInput<E>): Promise<ReplyOf<E>> {
  const { signal, key, ...parts } = input;
  const { params, query, body } = parts as { params?: object; query?: object; body?: object };
  const headers: Record<string, string> = { accept: 'application/json' };
  if (endpoint.method !== 'GET') headers['idempotency-key'] = key ?? v7();
  if (body !== undefined) headers['content-type'] = 'application/json';
  const response = await send(addressOf(endpoint.path, params, query), {
    method: endpoint.method,
    headers,
    credentials: 'same-origin',
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    ...(signal ? { signal } : {}),
  });
  if (!response.ok) throw await errorOf(response);
  return (await replyOf(endpoint, response)) as ReplyOf<E>;
}

/** Sends a file as a form, once for its key. @throws {ApiError} and the signal's reason, as `call` */
export async function sendFile<U extends Upload>(
  upload: U,
  input: { params: z.input<U['params']> & object; file: File; key: string; signal?: AbortSignal },
): Promise<z.output<U['reply']>> {
  const body = new FormData();
  body.append('file', input.file);
  const response = await send(addressOf(upload.path, input.params), {
    method: upload.method,
    headers: { accept: 'application/json', 'idempotency-key': input.key },
    credentials: 'same-origin',
    body,
    ...(input.signal ? { signal: input.signal } : {}),
  });
  if (!response.ok) throw await errorOf(response);
  return (await replyOf({ reply: upload.reply }, response)) as z.output<U['reply']>;
}

/** A file that was built along with the pages. @throws {ApiError} */
export async function readBuilt(path: string, signal: AbortSignal): Promise<unknown> {
  const response = await send(path, { signal });
  const isJson = response.headers.get('content-type')?.includes('json') ?? false;
  if (!response.ok || !isJson)
    throw new ApiError(response.ok ? 'not-found' : 'unreadable', { status: response.status });
  return response.json();
}

/** The path with its params filled in, and the query behind it without what is undefined. */
export function addressOf(path: string, params: object = {}, query: object = {}): string {
  const given = new Map<string, unknown>(Object.entries(params));
  const filled = path.replace(/:(\w+)/g, (_, name: string) => {
    const value = given.get(name);
    if (typeof value !== 'string' && typeof value !== 'number') throw new TypeError(`${path} lacks ${name}`);
    return encodeURIComponent(value);
  });
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) if (value != null) search.set(name, String(value));
  return search.size > 0 ? `${filled}?${search}` : filled;
}

async function send(address: string, init: RequestInit): Promise<Response> {
  try {
    const response = await fetch(address, init);
    reached(true);
    return response;
  } catch (error) {
    if (init.signal?.aborted) throw error;
    reached(false);
    throw new ApiError('unreachable');
  }
}

async function replyOf(endpoint: Pick<Endpoint, 'reply'>, response: Response): Promise<unknown> {
  if (endpoint.reply === nothing) return {};
  let reply: unknown;
  try {
    reply = await response.json();
  } catch {
    throw new ApiError('unreadable', { status: response.status });
  }
  // The server checks what it sends. Checking again on every phone costs time and finds nothing new.
  return import.meta.env.DEV ? endpoint.reply.parse(reply) : reply;
}

async function errorOf(response: Response): Promise<ApiError> {
  const status = response.status;
  const seconds = Number(response.headers.get('retry-after') ?? NaN);
  const retryAfterSeconds = Number.isFinite(seconds) ? seconds : null;
  const parsed = errorReply.safeParse(await response.json().catch(() => null));
  if (!parsed.success)
    return new ApiError(status === 503 ? 'unavailable' : 'unreadable', { status, retryAfterSeconds });
  return new ApiError(parsed.data.error.code, { ...parsed.data.error, status, retryAfterSeconds });
}
