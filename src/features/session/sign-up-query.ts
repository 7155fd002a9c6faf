import { queryOptions } from '@tanstack/react-query';
import { readSignUp } from '#contracts/sign-up.ts';
import { call } from '#src/lib/api.ts';

/** Whether strangers may open a shop on this server. */
export const signUpQuery = queryOptions({
  queryKey: ['sign-up'],
  queryFn: ({ signal }) => call(readSignUp, { signal }),
  staleTime: Infinity,
  retry: false,
});
