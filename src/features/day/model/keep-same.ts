import type { Drawn } from './board.ts';

/**
 * The new list, with the old object wherever it says the same: what is drawn from it then stays untouched. The server's
 * answers keep their unchanged parts as objects, so that members can be compared by identity.
 */
export function keepSame(before: readonly Drawn[], next: readonly Drawn[]): Drawn[] {
  const old = new Map(before.map((item) => [item.id, item]));
  return next.map((item) => {
    const was = old.get(item.id);
    return was && isSame(was, item) ? was : item;
  });
}

const isSame = (a: Drawn, b: Drawn): boolean =>
  a.from === b.from &&
  a.to === b.to &&
  a.rowId === b.rowId &&
  a.members.length === b.members.length &&
  a.members.every((bar, i) => bar === b.members[i]) &&
  JSON.stringify(a.shape) === JSON.stringify(b.shape);
