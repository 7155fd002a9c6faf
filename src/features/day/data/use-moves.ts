import { useCallback, useEffect, useRef, useState } from 'react';
import type { DayView } from '#contracts/day.ts';
import { isWhereItWas, type Move } from '../model/move-in-view.ts';
import { didAgain, didMove, emptyStack, moveBack, tookBack, type Deed, type UndoStack } from '../model/undo.ts';
import type { DayAsked } from './day-query.ts';
import { useMove } from './use-move.ts';

/** A move that did not come about, and why. */
export type Refused = { words: string; move: Move; error: unknown };
export type Moves = {
  move: (move: Move) => Promise<boolean>;
  undo: (() => void) | null;
  redo: (() => void) | null;
  refused: Refused | null;
  forgive: () => void;
  pending: boolean;
};

/** Moves with a way back. What is taken back is an ordinary move: the server looks at it as at any other. */
export function useMoves(asked: DayAsked, view: DayView | undefined): Moves {
  const { mutateAsync, isPending } = useMove(asked);
  const [stack, setStack] = useState<UndoStack>(emptyStack);
  const [refused, setRefused] = useState<Refused | null>(null);
  useForgetWithDraft(view, setStack);
  const latest = useRef(view);
  useEffect(() => {
    latest.current = view;
  });
  const send = useCallback(
    async (move: Move, words: string): Promise<boolean> => {
      setRefused(null);
      try {
        await mutateAsync(move);
        return true;
      } catch (error) {
        setRefused({ words, move, error });
        return false;
      }
    },
    [mutateAsync],
  );
  const move = useCallback(
    async (wanted: Move): Promise<boolean> => {
      const bar = latest.current?.bars.find((one) => one.id === wanted.stageId);
      if (!bar || isWhereItWas(bar, wanted)) return true;
      const words = `${bar.jobNumber} ${bar.title.toLowerCase()}`;
      const done = await send(wanted, words);
      if (done) setStack((now) => didMove(now, { words, again: wanted, back: moveBack(bar) }));
      return done;
    },
    [send],
  );
  const replay = (deed: Deed | undefined, move: (deed: Deed) => Move, after: (stack: UndoStack) => UndoStack) =>
    deed ? () => void send(move(deed), deed.words).then((done) => done && setStack(after)) : null;
  return {
    move,
    undo: replay(stack.done.at(-1), (deed) => deed.back, tookBack),
    redo: replay(stack.undone.at(-1), (deed) => deed.again, didAgain),
    refused,
    forgive: useCallback(() => setRefused(null), []),
    pending: isPending,
  };
}

/** Once the draft is posted, dropped or planned anew, there is nothing to go back to. */
function useForgetWithDraft(view: DayView | undefined, setStack: (stack: UndoStack) => void): void {
  const draftId = view?.draft?.id ?? null;
  const had = useRef<string | null>(null);
  useEffect(() => {
    if (had.current !== null && had.current !== draftId) setStack(emptyStack);
    had.current = draftId;
  }, [draftId, setStack]);
}
