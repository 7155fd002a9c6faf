import { queryOptions, useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { createContext, use } from 'react';
import type { Role } from '#contracts/common.ts';
import { readSession, type Me } from '#contracts/session.ts';
import { isApiError } from './api-error.ts';
import { call } from './api.ts';
import type { Formats } from './formats.ts';

export type Shop = Me['shops'][number];

/** Who is signed in; null where nobody is. The router's first question, asked once and kept. */
export const meQuery = queryOptions({
  queryKey: ['me'],
  queryFn: async ({ signal }): Promise<Me | null> => {
    try {
      return await call(readSession, { signal });
    } catch (error) {
      if (isApiError(error, 'not-signed-in')) return null;
      throw error;
    }
  },
  staleTime: 60_000,
});

/** The signed-in account. Only below the shells, which show the sign-in where there is none. */
export function useMe(): Me {
  const { data } = useSuspenseQuery(meQuery);
  if (!data) throw new Error('useMe outside of a signed-in shell');
  return data;
}
/** The same where it may be that nobody is signed in: undefined while it is asked. */
export const useMaybeMe = (): Me | null | undefined => useQuery(meQuery).data;

/** What the shell hands down: the shop of this tab, how it is written in for this reader, and the way to another. */
export type ShopChoice = { shop: Shop; formats: Formats; choose: (shopId: string) => void };
export const ShopContext = createContext<ShopChoice | null>(null);

export function useShopChoice(): ShopChoice {
  const choice = use(ShopContext);
  if (!choice) throw new Error('Outside of a shell with a shop');
  return choice;
}
/** The shop this tab works in, with the role one has there. */
export const useShop = (): Shop => useShopChoice().shop;
/** Times in the shop's zone, on the person's clock, in the person's units. */
export const useFormats = (): Formats => useShopChoice().formats;

/** What a role may do in the browser: the same as `server/policies.ts`, which decides. Hides what would be refused. */
export const may = {
  plan: (role: Role) => role === 'owner' || role === 'lead',
  keepJobs: (role: Role) => role !== 'painter',
  workStages: (role: Role) => role !== 'office',
  seeUse: (role: Role) => role === 'owner' || role === 'lead',
  keepSheets: (role: Role) => role === 'owner' || role === 'lead',
  setUp: (role: Role) => role === 'owner',
};

const key = 'ovenbird.shop';
// Per tab, so that two tabs may look at two shops; the last choice of any tab is where a new tab begins.
export function rememberedShop(): string | null {
  try {
    return sessionStorage.getItem(key) ?? localStorage.getItem(key);
  } catch {
    return null;
  }
}
export function rememberShop(shopId: string): void {
  try {
    sessionStorage.setItem(key, shopId);
    localStorage.setItem(key, shopId);
  } catch {
    // Storage may be closed to us; the choice then lasts as long as the page.
  }
}
