const tryAgainAfter = 1_000;

/**
 * Does `work` for a key whenever it is asked to, never twice at a time: asked while it is at it, it goes once more afterwards. `work`
 * answers true where more is left. After a failure it tries again by itself.
 */
export function makePump(work: (key: string) => Promise<boolean>, onError: (error: unknown) => void) {
  const under = new Map<string, 'running' | 'again'>();
  return async function pump(key: string): Promise<void> {
    if (under.has(key)) return void under.set(key, 'again');
    try {
      do {
        under.set(key, 'running');
        if (await work(key)) under.set(key, 'again');
      } while (under.get(key) === 'again');
    } catch (error) {
      onError(error);
      setTimeout(() => void pump(key), tryAgainAfter).unref();
    } finally {
      under.delete(key);
    }
  };
}
