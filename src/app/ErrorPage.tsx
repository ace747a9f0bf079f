import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { wordsOf } from '../lib/query.ts';
import { Mark } from '../ui/Mark.tsx';
import { paths } from './paths.ts';

/** The one error page. */
export function ErrorPage() {
  const error = useRouteError();
  const missing = isRouteErrorResponse(error) && error.status === 404;
  return (
    <main className="mx-auto max-w-xl px-4 py-16">
      <Mark size={32} />
      <h1 className="mt-4 text-2xl">{missing ? 'There is nothing here' : 'Something went wrong'}</h1>
      <p className="mt-2">
        {missing
          ? 'This address leads to no page. It may have been mistyped, or what it showed is gone.'
          : wordsOf(error)}
      </p>
      <p className="mt-4">
        <a href={paths.home}>Go to the first page</a>
      </p>
    </main>
  );
}
