import { createContext, useContext } from 'react';
import type { Axis } from '../model/axis.ts';
import type { Drawn } from '../model/board.ts';
import type { Hint } from '../model/landing.ts';
import type { BoardStore } from './board-store.ts';
import type { DayView } from '#contracts/day.ts';

/** What a bar needs beside its own figures. Stays the same object while names and clock settings do. */
export type BoardContextValue = {
  store: BoardStore;
  describe: (item: Drawn) => string;
  placeName: (id: string) => string;
  sayTime: (at: number) => string;
  sayDay: (at: number) => string;
  sayHint: (hint: Hint) => string;
  open: (item: Drawn) => void;
};
/** What changes with every answer of the server; kept apart so that bars do not listen to it. */
export type BoardData = { view: DayView; axis: Axis };

export const BoardContext = createContext<BoardContextValue | null>(null);
export const BoardDataContext = createContext<BoardData | null>(null);

export const useBoardContext = (): BoardContextValue => given(useContext(BoardContext));
export const useBoardData = (): BoardData => given(useContext(BoardDataContext));

function given<T>(value: T | null): T {
  if (value === null) throw new Error('A part of the booth day is drawn outside its board.');
  return value;
}
