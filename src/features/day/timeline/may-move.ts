import type { Drawn } from '../model/board.ts';

/** Lamps and hands follow their stage; what has begun is history. */
export const mayMove = ({ kind, members }: Pick<Drawn, 'kind' | 'members'>): boolean =>
  kind === 'stage' && members.every((bar) => bar.state === 'planned');
