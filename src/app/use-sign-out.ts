import { useMutation, useQueryClient } from '@tanstack/react-query';
import { signOut } from '../contract/accounts.ts';
import { call } from '../lib/api-client.ts';
import { paths } from '../lib/paths.ts';

/**
 * Ends the session and leads to the page where one signs in, loaded anew: nothing that was fetched under the session stays in
 * memory, and no part of the page that is left asks the server once more.
 */
export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    // What is still on its way would be refused as soon as the session has ended.
    onMutate: () => client.cancelQueries(),
    mutationFn: () => call(signOut, { params: {}, query: {} }),
    onSuccess: () => window.location.assign(paths.signIn.to()),
  });
}
