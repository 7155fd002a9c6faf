import type { ErrorCode, Reason } from '#contracts/reasons.ts';

export const statusOf: Record<ErrorCode, number> = {
  'bad-request': 400,
  'not-signed-in': 401,
  'wrong-credentials': 401,
  forbidden: 403,
  'cross-site': 403,
  'not-found': 404,
  stale: 409,
  taken: 409,
  'ground-shifted': 409,
  'key-reused': 409,
  gone: 410,
  'too-large': 413,
  'wrong-kind': 415,
  refused: 422,
  'too-many': 429,
  internal: 500,
  unavailable: 503,
};

type More = {
  fields?: { path: string; message: string }[];
  reasons?: Reason[];
  current?: unknown;
  retryAfterSeconds?: number;
};

/** The one error that services throw on purpose; http turns it into the error body of contracts/reasons.ts. */
export class Refusal extends Error {
  readonly code: ErrorCode;
  readonly more: More;
  constructor(code: ErrorCode, more: More = {}) {
    super(code);
    this.code = code;
    this.more = more;
  }
}

export const notFound = (): Refusal => new Refusal('not-found');
