import { useRouteError } from 'react-router-dom';
import { PageTitle } from '../lib/page-title.tsx';
import { paths } from '../lib/paths.ts';
import { Button, buttonLook } from '../ui/button.tsx';

/** A part of the program that could not be fetched after a new version was put in place, or a fault of ours. */
export function FailedPage() {
  const error = useRouteError();
  const isFetch = error instanceof TypeError && /import|module|fetch/i.test(error.message);
  return (
    <main className="mx-auto max-w-xl p-6 pt-16">
      <PageTitle>Page failed</PageTitle>
      <h1 className="mb-3 text-title">This page could not be shown</h1>
      <p className="mb-5">
        {isFetch
          ? 'A part of the program could not be fetched. The connection may be down, or the server was brought up to date while this page was open.'
          : 'A fault in the program stopped it. Nothing on the server was changed.'}{' '}
        Load the page again.
      </p>
      <div className="flex gap-3">
        <Button look="primary" onClick={() => window.location.reload()}>
          Load again
        </Button>
        <a className={buttonLook('plain')} href={paths.home}>
          Go to the map
        </a>
      </div>
    </main>
  );
}
