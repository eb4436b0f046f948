import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { signOut } from '../contract/accounts.ts';
import { call } from '../lib/api-client.ts';
import { paths } from '../lib/paths.ts';
import { sessionQuery } from '../lib/session-query.ts';

/** Ends the session, forgets what was fetched under it, and leads to the page where one signs in. */
export function useSignOut() {
  const navigate = useNavigate();
  const client = useQueryClient();
  return useMutation({
    mutationFn: () => call(signOut, { params: {}, query: {} }),
    onSuccess: () => {
      client.clear();
      client.setQueryData(sessionQuery.queryKey, { person: null, memberships: [] });
      navigate(paths.signIn.to());
    },
  });
}
