import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { readListLink, withLink, writeListLink, type ListLink } from '../model/list-link.ts';

/** The list's state, kept in the address. Typing replaces the entry in the browser's history, all else adds one. */
export function useListLink() {
  const [params, setParams] = useSearchParams();
  const link = useMemo(() => readListLink(params), [params]);
  const change = useCallback(
    (part: Partial<ListLink>, how: 'step' | 'typing' = 'step') =>
      setParams((now) => writeListLink(withLink(readListLink(now), part)), { replace: how === 'typing' }),
    [setParams],
  );
  return { link, change };
}
