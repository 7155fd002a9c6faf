import { useSyncExternalStore } from 'react';
import type { Drawn } from '../model/board.ts';

/** A bar under the pointer, and where it would land. `start` in milliseconds. */
export type Dragged = { item: Drawn; start: number; placeId: string };

/** What bars listen to one by one, so that choosing one does not draw all of them again. */
export type BoardState = {
  /** Stage shown in the panel. */
  selected: string | null;
  /** The one bar that Tab reaches; arrows go on from there. */
  focusStop: string | null;
  dragged: Dragged | null;
};

export type BoardStore = {
  get: () => BoardState;
  set: (change: Partial<BoardState>) => void;
  subscribe: (listener: () => void) => () => void;
};

export function createBoardStore(): BoardStore {
  let state: BoardState = { selected: null, focusStop: null, dragged: null };
  const listeners = new Set<() => void>();
  return {
    get: () => state,
    set: (change) => {
      state = { ...state, ...change };
      for (const listener of listeners) listener();
    },
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}

export const useBoard = <T>(store: BoardStore, pick: (state: BoardState) => T): T =>
  useSyncExternalStore(store.subscribe, () => pick(store.get()));
