import { useEffect, useRef } from 'react';
import { isTyping, useKeyHelp } from '#src/lib/key-help.ts';

export type DayKeys = {
  undo: (() => void) | null;
  redo: (() => void) | null;
  earlier: () => void;
  later: () => void;
  today: () => void;
  larger: () => void;
  smaller: () => void;
};

const help = [
  { keys: 'Arrows', does: 'from bar to bar' },
  { keys: 'Enter', does: 'open a bar; its form moves it' },
  { keys: 'Alt ← →', does: 'move a bar by five minutes' },
  { keys: 'Esc', does: 'let go of a drag, close the panel' },
  { keys: 'Ctrl Z', does: 'undo the last move' },
  { keys: 'Ctrl Shift Z', does: 'redo' },
  { keys: 'P, T, N', does: 'earlier, today, later' },
  { keys: '+ −', does: 'larger, smaller' },
] as const;

/** Keys of the whole page; those of the bars are in `timeline/use-arrows.ts`. */
export function useDayKeys(keys: DayKeys): void {
  useKeyHelp('Booth day', help);
  const latest = useRef(keys);
  useEffect(() => {
    latest.current = keys;
  });
  useEffect(() => {
    const onKeyDown = (event: KeyboardEvent) => {
      if (isTyping(event.target) || event.altKey) return;
      const deed = deedOf(event, latest.current);
      if (!deed) return;
      event.preventDefault();
      deed();
    };
    document.addEventListener('keydown', onKeyDown);
    return () => document.removeEventListener('keydown', onKeyDown);
  }, []);
}

function deedOf(event: KeyboardEvent, keys: DayKeys): (() => void) | null {
  const key = event.key.toLowerCase();
  if (event.ctrlKey || event.metaKey) {
    if (key === 'z') return event.shiftKey ? keys.redo : keys.undo;
    return key === 'y' ? keys.redo : null;
  }
  switch (key) {
    case 'p':
      return keys.earlier;
    case 'n':
      return keys.later;
    case 't':
      return keys.today;
    case '+':
      return keys.larger;
    case '-':
      return keys.smaller;
    default:
      return null;
  }
}
