import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo } from 'react';
import { dayQuery, type DayAsked } from './day-query.ts';
import { sawDraft } from './draft-head.ts';

/** The booth day, its neighbours fetched ahead so that turning the page is instant. */
export function useDay(asked: DayAsked, neighbours: readonly Pick<DayAsked, 'from' | 'to'>[]) {
  const client = useQueryClient();
  const day = useQuery(dayQuery(asked));
  const { data } = day;
  useEffect(() => {
    if (data) sawDraft(client, asked.shopId, data.draft);
  }, [client, asked.shopId, data]);
  const ahead = useMemo(() => neighbours.map((range) => dayQuery({ ...asked, ...range })), [asked, neighbours]);
  const isThere = data !== undefined;
  useEffect(() => {
    if (isThere) for (const query of ahead) void client.prefetchQuery(query);
  }, [client, ahead, isThere]);
  return day;
}
