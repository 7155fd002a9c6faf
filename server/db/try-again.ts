/** Deadlock and failed serialization: nobody's fault, and gone at the next try. PostgreSQL manual, appendix A. */
const PASSING = new Set(['40P01', '40001']);

/** Runs a whole transaction again where the database gave it up for another, three times at most. */
export async function tryAgain<T>(work: () => Promise<T>, times = 3): Promise<T> {
  for (let left = times; ; left -= 1) {
    try {
      return await work();
    } catch (error) {
      const code = error instanceof Error && 'code' in error ? String(error.code) : '';
      if (left <= 1 || !PASSING.has(code)) throw error;
    }
  }
}
