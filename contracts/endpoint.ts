import * as z from 'zod';

export type Method = 'GET' | 'POST' | 'PATCH' | 'DELETE';

/** What browser and server promise each other about one address. `path` names its params as Express does. */
export type Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Reply extends z.ZodType = z.ZodType,
> = { name: string; method: Method; path: `/api/${string}`; params: Params; query: Query; body: Body; reply: Reply };

export const nothing = z.strictObject({});
type Nothing = typeof nothing;

/** Fills in what an endpoint does not use: no params, no query, no body. A reply of `nothing` is sent as 204. */
export function endpoint<
  Params extends z.ZodType = Nothing,
  Query extends z.ZodType = Nothing,
  Body extends z.ZodType = Nothing,
  Reply extends z.ZodType = Nothing,
>(given: {
  name: string;
  method: Method;
  path: `/api/${string}`;
  params?: Params;
  query?: Query;
  body?: Body;
  reply?: Reply;
}): Endpoint<Params, Query, Body, Reply> {
  const or = <T extends z.ZodType>(schema: T | undefined) => schema ?? (nothing as unknown as T);
  return {
    name: given.name,
    method: given.method,
    path: given.path,
    params: or(given.params),
    query: or(given.query),
    body: or(given.body),
    reply: or(given.reply),
  };
}

export type ReplyOf<E extends Endpoint> = z.output<E['reply']>;
export type BodyOf<E extends Endpoint> = z.input<E['body']>;
