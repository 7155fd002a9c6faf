import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { readDayLink, writeDayLink, type DayLink } from './model/day-link.ts';

/** The view as the address has it. Turning the page is a step in the browser's history, choosing a stage is not. */
export function useDayLink(today: string): [DayLink, (change: Partial<DayLink>) => void] {
  const [params, setParams] = useSearchParams();
  const link = useMemo(() => readDayLink(params, today), [params, today]);
  const change = useCallback(
    (part: Partial<DayLink>) => {
      const isStep = 'date' in part || 'span' in part;
      setParams((now) => writeDayLink({ ...readDayLink(now, today), ...part }, today), { replace: !isStep });
    },
    [setParams, today],
  );
  return [link, change];
}
