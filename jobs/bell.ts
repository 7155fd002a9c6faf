/** Wakes sleepers. One who asks for the next ring before looking for work cannot sleep through a ring meanwhile. */
export function makeBell() {
  let ring = () => {};
  let rung = Promise.resolve();
  const renew = () => {
    rung = new Promise((resolve) => {
      ring = resolve;
    });
  };
  renew();
  return {
    ring: () => {
      ring();
      renew();
    },
    next: (): Promise<void> => rung,
    /** Resolves at `heard`, after so many milliseconds, or when `signal` is given, whichever comes first. */
    ringOr: (heard: Promise<void>, milliseconds: number, signal: AbortSignal): Promise<void> =>
      new Promise((resolve) => {
        if (signal.aborted) return resolve();
        const done = () => {
          clearTimeout(timer);
          signal.removeEventListener('abort', done);
          resolve();
        };
        const timer = setTimeout(done, milliseconds);
        signal.addEventListener('abort', done);
        void heard.then(done);
      }),
  };
}
