import type { ErrorCode, Reason } from '#contracts/reasons.ts';

/** `unreachable`: no answer came at all. `unreadable`: an answer came that is none of ours (a proxy's page, say). */
export type ApiErrorCode = ErrorCode | 'unreachable' | 'unreadable';

type More = {
  status?: number;
  fields?: { path: string; message: string }[] | undefined;
  reasons?: Reason[] | undefined;
  current?: unknown;
  requestId?: string | undefined;
  retryAfterSeconds?: number | null;
};

/** Why a call failed; `src/lib/error-texts.ts` makes sentences of it. */
export class ApiError extends Error {
  readonly code: ApiErrorCode;
  /** 0 where no answer came. */
  readonly status: number;
  readonly fields: readonly { path: string; message: string }[];
  readonly reasons: readonly Reason[];
  /** On `stale`: what it is now. */
  readonly current: unknown;
  readonly requestId: string | null;
  readonly retryAfterSeconds: number | null;
  constructor(code: ApiErrorCode, more: More = {}) {
    super(code);
    this.name = 'ApiError';
    this.code = code;
    this.status = more.status ?? 0;
    this.fields = more.fields ?? [];
    this.reasons = more.reasons ?? [];
    this.current = more.current;
    this.requestId = more.requestId ?? null;
    this.retryAfterSeconds = more.retryAfterSeconds ?? null;
  }
}

export const isApiError = (error: unknown, ...codes: ApiErrorCode[]): error is ApiError =>
  error instanceof ApiError && (codes.length === 0 || codes.includes(error.code));
