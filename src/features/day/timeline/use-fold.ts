import { useCallback, useState } from 'react';
import type { RowGroup } from './rows.ts';

const key = 'ovenbird.day.folded';

function remembered(): ReadonlySet<RowGroup> {
  try {
    return new Set(JSON.parse(localStorage.getItem(key) ?? '[]') as RowGroup[]);
  } catch {
    return new Set(); // storage closed to us, or not ours: everything unfolded
  }
}

/** Which groups of rows are folded, remembered by the browser. */
export function useFold(): { folded: ReadonlySet<RowGroup>; toggle: (group: RowGroup) => void } {
  const [folded, setFolded] = useState(remembered);
  const toggle = useCallback(
    (group: RowGroup) =>
      setFolded((before) => {
        const next = new Set(before);
        if (!next.delete(group)) next.add(group);
        try {
          localStorage.setItem(key, JSON.stringify([...next]));
        } catch {
          // Then it lasts as long as the page.
        }
        return next;
      }),
    [],
  );
  return { folded, toggle };
}
