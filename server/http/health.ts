import { readHealth, readReady } from '#contracts/health.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { checkHealth } from '../services/check-health.ts';
import type { Routes } from './route.ts';

export function healthRoutes(routes: Routes, deps: Deps, isReady: () => boolean): void {
  routes.open(readHealth, 'public', async () => {
    await checkHealth(deps);
    return { status: 'ok' as const };
  });
  routes.open(readReady, 'public', async () => {
    if (!isReady()) throw new Refusal('unavailable', { retryAfterSeconds: 2 });
    await checkHealth(deps);
    return { status: 'ready' as const };
  });
}
