import type { NextFunction, Request, Response, Router } from 'express';
import type * as z from 'zod';
import type { Endpoint } from '#contracts/endpoint.ts';
import { nothing } from '#contracts/endpoint.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import type { Actor } from '../policies.ts';
import { actorOf } from './actor.ts';

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
      if (access === 'account' && !req.isAuthenticated()) throw new Refusal('not-signed-in');
      return handle(parse(endpoint, req, res));
    });
  }

  /** A route in a shop: who is not a member is told the same as for a shop that does not exist. */
  shop<E extends Endpoint>(
    endpoint: E,
    access: (actor: Actor) => boolean,
    handle: (call: Call<E> & { actor: Actor }) => Reply<E>,
  ): void {
    this.#add(endpoint, access, async (req, res) => {
      const actor = await actorOf(this.#deps, req);
      if (!access(actor)) throw new Refusal('forbidden');
      return handle({ ...parse(endpoint, req, res), actor });
    });
  }

  #add(endpoint: Endpoint, access: Access, answer: (req: Request, res: Response) => Promise<unknown>): void {
    this.list.push({ name: endpoint.name, method: endpoint.method, path: endpoint.path, access });
    const method = endpoint.method.toLowerCase() as 'get' | 'post' | 'patch' | 'delete';
    this.#router[method](endpoint.path, async (req: Request, res: Response, next: NextFunction) => {
      try {
        const reply = await answer(req, res);
        if (res.headersSent) return;
        if (endpoint.reply === nothing) res.status(204).end();
        else res.json(endpoint.reply.parse(reply));
      } catch (error) {
        next(error);
      }
    });
  }
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
