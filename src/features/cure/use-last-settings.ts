import { useEffect, useRef } from 'react';
import { firstValues, type FieldKey, type Values } from './model/desk-state.ts';
import { useDesk } from './use-desk.ts';

const store = 'ovenbird.trace-settings';
const kept: FieldKey[] = ['coating', 'col', 'unit', 'clock', 'limit'];

/** Who judges one bake judges more of the same logger: what was set last is set again, unless the address says otherwise. */
export function useLastSettings(): void {
  const { values, set } = useDesk();
  const isFirst = useRef(true);
  const now = JSON.stringify(Object.fromEntries(kept.map((key) => [key, values[key]])));
  useEffect(() => {
    if (isFirst.current) {
      isFirst.current = false;
      const untouched = kept.every((key) => values[key] === firstValues[key]);
      if (untouched) set(readLast());
      return;
    }
    try {
      localStorage.setItem(store, now);
    } catch {
      // Storage is full or closed: the settings are then those of this page alone.
    }
    // What is set is of the moment it was read; only a change of the values counts.
  }, [now, set, values]);
}

function readLast(): Partial<Values> {
  try {
    const last: unknown = JSON.parse(localStorage.getItem(store) ?? '{}');
    if (typeof last !== 'object' || last === null) return {};
    return Object.fromEntries(
      Object.entries(last).filter(([key, value]) => kept.some((one) => one === key) && typeof value === 'string'),
    );
  } catch {
    return {};
  }
}
