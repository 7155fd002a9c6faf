import { useEffect, useRef } from 'react';
import { readTrace } from '#contracts/traces.ts';
import { call } from '#src/lib/api.ts';
import { useShop } from '#src/lib/session.ts';
import { useDesk } from './use-desk.ts';
import type { TraceReader } from './use-trace-file.ts';

/** Opens the trace that the address names, as it is kept with its stage. */
export function useStoredTrace({ openText }: TraceReader): void {
  const shop = useShop();
  const { values } = useDesk();
  const opened = useRef('');
  useEffect(() => {
    const traceId = values.trace;
    if (traceId === '' || traceId === opened.current) return;
    opened.current = traceId;
    openText('the kept trace', async () => (await call(readTrace, { params: { shopId: shop.id, traceId } })).csv);
  }, [values.trace, openText, shop.id]);
}
