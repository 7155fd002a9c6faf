import type { BodyOf } from '#contracts/endpoint.ts';
import type { changeAccount as contract } from '#contracts/session.ts';
import { updateAccount } from '../db/accounts.ts';
import type { Deps } from '../deps.ts';

export const changeAccount = (deps: Deps, accountId: string, changed: BodyOf<typeof contract>): Promise<void> =>
  updateAccount(deps.db, accountId, changed);
