import { useEffect, useState } from 'react';
import { flushSync } from 'react-dom';

/** When the sheet was asked for (ms), null while nobody prints: the sheet is drawn for the printer only. */
export function usePrinting(): number | null {
  const [printedAt, setPrintedAt] = useState<number | null>(null);
  useEffect(() => {
    // The browser takes its picture as soon as this returns.
    const begin = () => flushSync(() => setPrintedAt(Date.now()));
    const end = () => setPrintedAt(null);
    addEventListener('beforeprint', begin);
    addEventListener('afterprint', end);
    return () => {
      removeEventListener('beforeprint', begin);
      removeEventListener('afterprint', end);
    };
  }, []);
  return printedAt;
}
