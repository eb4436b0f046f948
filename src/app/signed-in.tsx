import { useQuery } from '@tanstack/react-query';
import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { errorSentence } from '../lib/api-error.ts';
import { paths } from '../lib/paths.ts';
import { sessionQuery } from '../lib/session-query.ts';
import { Button } from '../ui/button.tsx';
import { Loading } from '../ui/loading.tsx';
import { Notice } from '../ui/notice.tsx';

/** Lets only a signed-in person through; anyone else signs in and comes back to where they were. */
export function SignedIn() {
  const session = useQuery(sessionQuery);
  const location = useLocation();
  if (session.isPending) return <Loading what="your session" />;
  if (session.isError && !session.data) {
    return (
      <main className="mx-auto max-w-xl p-6 pt-16">
        <Notice tone="wrong" live actions={<Button onClick={() => session.refetch()}>Try again</Button>}>
          {errorSentence(session.error)}
        </Notice>
      </main>
    );
  }
  if (session.data.person === null) {
    return <Navigate to={paths.signIn.to(location.pathname + location.search)} replace />;
  }
  return <Outlet />;
}
