import { Link } from 'react-router-dom';
import { PageTitle } from '../lib/page-title.tsx';
import { paths } from '../lib/paths.ts';

/** Inside a team the shell holds the page; elsewhere it stands alone and is the main part itself. */
export function NotFoundPage({ isAlone = false }: { isAlone?: boolean }) {
  const Frame = isAlone ? 'main' : 'div';
  return (
    <Frame className="mx-auto w-full max-w-xl p-6 pt-16">
      <PageTitle>Not found</PageTitle>
      <h1 className="mb-3 text-title">There is no such page</h1>
      <p>
        It may have been removed, or it belongs to a team that you are not in.{' '}
        <Link to={paths.home}>Go to the map</Link>.
      </p>
    </Frame>
  );
}
