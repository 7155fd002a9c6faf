import { queryOptions } from '@tanstack/react-query';
import { readHours } from '#contracts/hours.ts';
import { listLamps } from '#contracts/lamps.ts';
import { listPlaces } from '#contracts/places.ts';
import { readShop } from '#contracts/shop-settings.ts';
import { listFilters } from '#contracts/upkeep.ts';
import { call } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';

// The set-up changes seldom, and a notice says when: nothing is asked twice in between.
const staleTime = 60_000;

export const placesQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'places'),
    queryFn: ({ signal }) => call(listPlaces, { params: { shopId }, signal }),
    staleTime,
  });
export const lampsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'lamps'),
    queryFn: ({ signal }) => call(listLamps, { params: { shopId }, signal }),
    staleTime,
  });
export const hoursQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'hours'),
    queryFn: ({ signal }) => call(readHours, { params: { shopId }, signal }),
    staleTime,
  });
export const filtersQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'filters'),
    queryFn: ({ signal }) => call(listFilters, { params: { shopId }, signal }),
    staleTime,
  });
export const settingsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'settings'),
    queryFn: ({ signal }) => call(readShop, { params: { shopId }, signal }),
    staleTime,
  });
