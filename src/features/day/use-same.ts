import { useState } from 'react';

/** The first of values that say the same (as JSON), so that what depends on it is not made anew for nothing. */
export function useSame<T>(value: T): T {
  const [kept, keep] = useState(value);
  if (kept === value || JSON.stringify(kept) === JSON.stringify(value)) return kept;
  keep(value);
  return value;
}
