import { useEffect, useState } from 'react';

/**
 * Server time in milliseconds, each second anew. It is read from the clock and not counted, so a phone that slept or
 * throttled the page shows the right time as soon as it shows anything.
 */
export function useServerNow(skew: number): number {
  const [now, setNow] = useState(() => Date.now());
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout>;
    const tick = () => {
      clearTimeout(timer);
      const at = Date.now();
      setNow(at);
      // At the turn of the server's second, so that nothing seems to skip.
      timer = setTimeout(tick, 1000 - ((((at + skew) % 1000) + 1000) % 1000));
    };
    tick();
    document.addEventListener('visibilitychange', tick);
    addEventListener('pageshow', tick);
    return () => {
      clearTimeout(timer);
      document.removeEventListener('visibilitychange', tick);
      removeEventListener('pageshow', tick);
    };
  }, [skew]);
  return now + skew;
}
