/** A tap on Start or Done, on its way to the server. */
export type Tap = {
  /** Idempotency key: sent again with it, the tap counts once. */
  key: string;
  stageId: string;
  deed: 'start' | 'finish';
  /** Version of the stage that was seen. */
  version: number;
  /** Server time of the tap as well as we know it; only for what is shown until the server answers. */
  at: string;
  /** `2418 Prime`, for what is said about it. */
  words: string;
  /** Why it is sprayed although the dew-point gate is shut. */
  overrule?: string | undefined;
};

export type Refused = { tap: Tap; error: unknown };
export type TapState = { taps: readonly Tap[]; refused: Refused | null; isStuck: boolean };

type Ways = {
  load: () => Tap[];
  save: (taps: readonly Tap[]) => void;
  send: (tap: Tap) => Promise<{ version: number }>;
  /** What a failure means: send it `again`, keep it for `later` (somebody has to sign in first), or it is `refused`. */
  judge: (error: unknown) => 'again' | 'later' | 'refused';
  /** Waits before the next try; the number of tries so far. */
  rest: (tries: number) => Promise<void>;
  /** After an answer, before the tap disappears: fetches what is true now. */
  settle: () => Promise<unknown>;
};

/** Taps are sent one after the other, kept until answered, and survive a reload: never lost, never counted twice. */
export function tapQueue(ways: Ways) {
  let state: TapState = { taps: ways.load(), refused: null, isStuck: false };
  let isRunning = false;
  const listeners = new Set<() => void>();
  const set = (change: Partial<TapState>) => {
    state = { ...state, ...change };
    if (change.taps) ways.save(change.taps);
    for (const listener of listeners) listener();
  };
  const without = (gone: (tap: Tap) => boolean) => state.taps.filter((tap) => !gone(tap));

  /** True: it is out of the way, and the next may go. */
  async function one(tap: Tap): Promise<boolean> {
    for (let tries = 0; ; tries++) {
      try {
        const { version } = await ways.send(tap);
        await ways.settle();
        // What follows on the same stage has to name the version that this tap made.
        const rest = without(({ key }) => key === tap.key);
        set({ isStuck: false, taps: rest.map((t) => (t.stageId === tap.stageId ? { ...t, version } : t)) });
        return true;
      } catch (error) {
        const verdict = ways.judge(error);
        if (verdict !== 'refused') set({ isStuck: true });
        if (verdict === 'later') return false;
        if (verdict === 'again') {
          await ways.rest(tries);
          continue;
        }
        await ways.settle();
        // A Done behind a refused Start has nothing to stand on.
        set({ isStuck: false, refused: { tap, error }, taps: without(({ stageId }) => stageId === tap.stageId) });
        return true;
      }
    }
  }

  async function run(): Promise<void> {
    if (isRunning) return;
    isRunning = true;
    try {
      for (let next = state.taps[0]; next; next = state.taps[0]) if (!(await one(next))) return;
    } finally {
      isRunning = false;
    }
  }

  return {
    read: () => state,
    listen: (listener: () => void) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    run,
    add: (tap: Tap): Promise<void> => {
      set({ taps: [...state.taps, tap], refused: null });
      return run();
    },
    forgive: () => set({ refused: null }),
  };
}
export type TapQueue = ReturnType<typeof tapQueue>;
