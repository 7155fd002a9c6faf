import { makeMailer } from '#server/mail/mailer.ts';
import type { Deps } from '#server/deps.ts';
import { lanes, registry } from '../../jobs/registry.ts';
import { startWorker, type WorkerOptions } from '../../jobs/worker.ts';

/** The worker as it runs in the product, but that it does not wait long before it tries again. */
export function startTestWorker(
  deps: Deps,
  smtpUrl: string,
  options: Partial<WorkerOptions> = {},
): () => Promise<void> {
  const mailer = makeMailer(deps.config, smtpUrl);
  return startWorker({ ...deps, mailer }, { registry, lanes, retryDelay: () => 30, pollEvery: 30, ...options });
}

/** Asks again and again, for what shows in no event. Fails at last with what it saw last. */
export async function eventually<T>(
  look: () => Promise<T>,
  isThere: (seen: T) => boolean,
  withinMilliseconds = 30_000,
): Promise<T> {
  const end = Date.now() + withinMilliseconds;
  for (;;) {
    const seen = await look();
    if (isThere(seen)) return seen;
    if (Date.now() > end) throw new Error(`did not come about; last seen: ${JSON.stringify(seen)}`);
    await new Promise((resolve) => setTimeout(resolve, 25));
  }
}
