import { createHash } from 'node:crypto';
import type { NextFunction, Request, Response, Router } from 'express';
import * as z from 'zod';
import type { Upload } from '#contracts/attachments.ts';
import type { Endpoint } from '#contracts/endpoint.ts';
import { nothing } from '#contracts/endpoint.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { dropStray, type ReceivedFile } from '../services/keep-file.ts';
import { once } from '../services/once.ts';
import { actorOf } from './actor.ts';
import { receiveFile } from './receive-file.ts';
import { sendFile, type SentFile } from './send-file.ts';
import { mustBeSignedIn } from './signed-in.ts';

/** `public`: anybody. `account`: signed in, no shop. A predicate: a member of the shop in the address who may. */
export type Access = 'public' | 'account' | ((actor: Actor) => boolean);

type Call<E extends Endpoint> = {
  params: z.output<E['params']>;
  query: z.output<E['query']>;
  body: z.output<E['body']>;
  req: Request;
  res: Response;
};
type Reply<E extends Endpoint> = Promise<z.input<E['reply']>>;

/** Every route of the program, for the test that asks for a row in the table of rights. */
export type Route = { name: string; method: string; path: string; access: Access };

export class Routes {
  readonly list: Route[] = [];
  readonly #router: Router;
  readonly #deps: Deps;
  constructor(router: Router, deps: Deps) {
    this.#router = router;
    this.#deps = deps;
  }

  /** A route without a shop. */
  open<E extends Endpoint>(endpoint: E, access: 'public' | 'account', handle: (call: Call<E>) => Reply<E>): void {
    this.#add(endpoint, access, async (req, res) => {
      if (access === 'account') mustBeSignedIn(req);
      return endpoint.reply.parse(await handle(parse(endpoint, req, res)));
    });
  }

  /**
   * A route in a shop: who is not a member is told the same as for a shop that does not exist. A write that comes with an
   * Idempotency-Key is done once, however often it is sent. `keepReply: false`: the answer holds a secret that must not be
   * kept for a next time, so the key of the request is passed over; its body names an id of its own.
   */
  shop<E extends Endpoint>(
    endpoint: E,
    access: (actor: Actor) => boolean,
    handle: (call: Call<E> & { actor: Actor }) => Reply<E>,
    { keepReply = true }: { keepReply?: boolean } = {},
  ): void {
    this.#add(endpoint, access, async (req, res) => {
      const actor = await actorOf(this.#deps, req);
      if (!access(actor)) throw new Refusal('forbidden');
      const call = parse(endpoint, req, res);
      const answer = async () => endpoint.reply.parse(await handle({ ...call, actor }));
      const key = endpoint.method === 'GET' || !keepReply ? undefined : keyOf(req);
      return key === undefined ? answer() : once(this.#deps, actor, keyed(key, endpoint, call), answer);
    });
  }

  /** A stream in a shop that answers for itself. */
  stream(
    stream: { name: string; method: 'GET'; path: string },
    access: (actor: Actor) => boolean,
    handle: (call: { actor: Actor; req: Request; res: Response }) => Promise<void>,
  ): void {
    this.#add({ ...stream, reply: nothing }, access, async (req, res) => {
      const actor = await actorOf(this.#deps, req);
      if (!access(actor)) throw new Refusal('forbidden');
      await handle({ actor, req, res });
    });
  }

  /**
   * A file sent as a form, taken once for the key it must carry: a header of our own is what no other site's form can send.
   * The bytes count for what makes two requests the same. Where it fails, what was stored is taken out again.
   */
  upload<U extends Upload>(
    upload: U,
    access: (actor: Actor) => boolean,
    kinds: readonly string[],
    handle: (call: { actor: Actor; params: z.output<U['params']>; file: ReceivedFile }) => Promise<z.input<U['reply']>>,
  ): void {
    const endpoint = { ...upload, query: nothing, body: nothing };
    this.#add(endpoint, access, async (req, res) => {
      const actor = await actorOf(this.#deps, req);
      if (!access(actor)) throw new Refusal('forbidden');
      const call = parse({ ...endpoint, body: z.unknown() }, req, res);
      return receiveFile(req, res, kinds, async (file) => {
        const key = keyOf(req);
        if (key === undefined) throw keyMissing();
        const body = [file.name, file.sha256.toString('hex')];
        const answer = async () => endpoint.reply.parse(await handle({ actor, params: call.params, file }));
        try {
          return await once(this.#deps, actor, keyed(key, endpoint, { ...call, body }), answer);
        } catch (error) {
          await dropStray(this.#deps, actor, file.id);
          throw error;
        }
      });
    });
  }

  /** A file of a shop, to be saved or, with `?open=1`, to be shown by the browser itself. */
  download<D extends Pick<Endpoint, 'name' | 'path' | 'params'> & { method: 'GET' }>(
    download: D,
    access: (actor: Actor) => boolean,
    handle: (call: { actor: Actor; params: z.output<D['params']> }) => Promise<SentFile>,
  ): void {
    const endpoint = { ...download, query: z.strictObject({ open: z.literal('1').optional() }), body: nothing };
    this.#add({ ...endpoint, reply: nothing }, access, async (req, res) => {
      const actor = await actorOf(this.#deps, req);
      if (!access(actor)) throw new Refusal('forbidden');
      const { params, query } = parse({ ...endpoint, reply: nothing }, req, res);
      await sendFile(res, await handle({ actor, params }), query.open === '1');
    });
  }

  #add(
    endpoint: Pick<Endpoint, 'name' | 'method' | 'reply'> & { path: string },
    access: Access,
    answer: (req: Request, res: Response) => Promise<unknown>,
  ): void {
    this.list.push({ name: endpoint.name, method: endpoint.method, path: endpoint.path, access });
    const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'patch' | 'delete';
    this.#router[method](endpoint.path, async (req: Request, res: Response, next: NextFunction) => {
      try {
        const reply = await answer(req, res);
        if (res.headersSent) return;
        if (endpoint.reply === nothing) res.status(204).end();
        else res.json(reply);
      } catch (error) {
        next(error);
      }
    });
  }
}

const keyMissing = () =>
  new Refusal('bad-request', { fields: [{ path: 'headers.idempotency-key', message: 'must be there' }] });

function keyOf(req: Request): string | undefined {
  const key = req.get('idempotency-key');
  if (key !== undefined && !/^[\x21-\x7e]{8,120}$/.test(key))
    throw new Refusal('bad-request', {
      fields: [{ path: 'headers.idempotency-key', message: 'must be 8 to 120 visible ASCII characters' }],
    });
  return key;
}

/** What makes two requests the same: the route and everything that was read from the request. */
function keyed(key: string, endpoint: Endpoint, { params, query, body }: Call<Endpoint>) {
  const hash = createHash('sha256')
    .update(JSON.stringify([params, query, body]))
    .digest();
  return { key, route: `${endpoint.method} ${endpoint.path}`, hash };
}

function parse<E extends Endpoint>(endpoint: E, req: Request, res: Response): Call<E> {
  const fields: { path: string; message: string }[] = [];
  const read = (part: 'params' | 'query' | 'body', given: unknown): unknown => {
    const parsed = endpoint[part].safeParse(given);
    if (parsed.success) return parsed.data;
    for (const issue of parsed.error.issues)
      fields.push({ path: [part, ...issue.path].join('.'), message: issue.message });
    return undefined;
  };
  const params = read('params', req.params);
  const query = read('query', req.query);
  const body = read('body', endpoint.method === 'GET' || endpoint.body === nothing ? (req.body ?? {}) : req.body);
  // An id that is none cannot exist: said as for any unknown id.
  if (fields.some((field) => field.path.startsWith('params'))) throw new Refusal('not-found');
  if (fields.length > 0) throw new Refusal('bad-request', { fields });
  return { params, query, body, req, res } as Call<E>;
}
