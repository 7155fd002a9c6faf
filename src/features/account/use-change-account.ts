import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { BodyOf } from '#contracts/endpoint.ts';
import { changeAccount } from '#contracts/session.ts';
import { call } from '#src/lib/api.ts';
import { meQuery } from '#src/lib/session.ts';

export function useChangeAccount() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: BodyOf<typeof changeAccount>) => call(changeAccount, { body }),
    onSuccess: (me) => client.setQueryData(meQuery.queryKey, me),
  });
}
