import { describe, expect, it } from 'vitest';
import { tapQueue, type Tap } from './tap-queue.ts';

class Passing extends Error {}
class SignedOut extends Error {}
const tap = (n: number, given: Partial<Tap> = {}): Tap => ({
  key: `key-${n}`,
  stageId: `stage-${n}`,
  deed: 'start',
  version: 1,
  at: '2026-03-12T08:00:00.000Z',
  words: `${n}`,
  ...given,
});

/** A queue on a store and a server of its own. `answers` says what each send comes to, in order. */
function aQueue(answers: (number | Error)[], stored: Tap[] = []) {
  const sent: Tap[] = [];
  const log: string[] = [];
  let store = stored;
  const queue = tapQueue({
    load: () => [...store],
    save: (taps) => (store = [...taps]),
    send: async (tapped) => {
      sent.push(tapped);
      log.push(`send ${tapped.key}`);
      const answer = answers.shift() ?? 2;
      if (answer instanceof Error) throw answer;
      return { version: answer };
    },
    judge: (error) => (error instanceof Passing ? 'again' : error instanceof SignedOut ? 'later' : 'refused'),
    rest: async (tries) => void log.push(`rest ${tries}`),
    settle: async () => void log.push('settle'),
  });
  return { queue, sent, log, stored: () => store };
}

describe('taps on their way', () => {
  it('are sent one after the other and let go once what is true now was fetched', async () => {
    const { queue, log, stored } = aQueue([2, 2]);
    await Promise.all([queue.add(tap(1)), queue.add(tap(2))]);
    await expect.poll(() => queue.read().taps).toEqual([]);
    expect(log).toEqual(['send key-1', 'settle', 'send key-2', 'settle']);
    expect(stored()).toEqual([]);
  });

  it('are kept and sent again with the same key while nobody answers', async () => {
    const { queue, sent, log } = aQueue([new Passing(), new Passing(), 2]);
    await queue.add(tap(1));
    expect(sent.map((each) => each.key)).toEqual(['key-1', 'key-1', 'key-1']);
    expect(log).toEqual(['send key-1', 'rest 0', 'send key-1', 'rest 1', 'send key-1', 'settle']);
    expect(queue.read()).toEqual({ taps: [], refused: null, isStuck: false });
  });

  it('wait for a sign-in and are sent when asked again', async () => {
    const { queue, sent, stored } = aQueue([new SignedOut(), 2]);
    await queue.add(tap(1));
    expect([sent.length, stored().length, queue.read().isStuck]).toEqual([1, 1, true]);
    await queue.run();
    expect([sent.length, stored().length, queue.read().isStuck]).toEqual([2, 0, false]);
  });

  it('survive a reload', async () => {
    const { queue, sent, stored } = aQueue([2], [tap(1)]);
    expect(queue.read().taps).toHaveLength(1);
    await queue.run();
    expect(sent).toEqual([tap(1)]);
    expect(stored()).toEqual([]);
  });

  it('hand the version that a Start made on to the Done behind it', async () => {
    const { queue, sent } = aQueue([7, 8], [tap(1), tap(2, { stageId: 'stage-1', deed: 'finish' })]);
    await queue.run();
    expect(sent.map((each) => [each.deed, each.version])).toEqual([
      ['start', 1],
      ['finish', 7],
    ]);
  });

  it('say why one was refused, drop what stood on it, and go on with the others', async () => {
    const refusal = new Error('refused');
    const { queue, sent } = aQueue([refusal, 2], [tap(1), tap(2, { stageId: 'stage-1', deed: 'finish' }), tap(3)]);
    await queue.run();
    expect(sent.map((each) => each.key)).toEqual(['key-1', 'key-3']);
    expect(queue.read().refused).toEqual({ tap: tap(1), error: refusal });
    queue.forgive();
    expect(queue.read().refused).toBeNull();
  });
});
