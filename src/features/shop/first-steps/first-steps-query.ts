import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import type * as z from 'zod';
import type { inShop } from '#contracts/common.ts';
import type { Endpoint, nothing } from '#contracts/endpoint.ts';
import { readFirstSteps, type firstSteps } from '#contracts/first-steps.ts';
import { call, type CallInput } from '#src/lib/api.ts';
import { shopKey } from '#src/lib/query-keys.ts';
import { meQuery, useShop } from '#src/lib/session.ts';

export const firstStepsQuery = (shopId: string) =>
  queryOptions({
    queryKey: shopKey(shopId, 'setup', 'first-steps'),
    queryFn: ({ signal }) => call(readFirstSteps, { params: { shopId }, signal }),
  });

type StepEndpoint<Body extends z.ZodType> = Endpoint<typeof inShop, typeof nothing, Body, typeof firstSteps>;

/** Takes a step. It may have changed anything of the shop, its zone and who one is in it. */
export function useTakeStep<Body extends z.ZodType>(endpoint: StepEndpoint<Body>, onTaken: () => void) {
  const shop = useShop();
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.output<Body>) =>
      call(endpoint, { params: { shopId: shop.id }, body } as unknown as CallInput<StepEndpoint<Body>>),
    onSuccess: async (reply) => {
      await Promise.all([
        client.invalidateQueries({ queryKey: [shop.id] }),
        client.invalidateQueries({ queryKey: meQuery.queryKey }),
      ]);
      client.setQueryData(firstStepsQuery(shop.id).queryKey, reply);
      onTaken();
    },
  });
}
