import { isRouteErrorResponse, Link, useRouteError } from 'react-router-dom';
import { NotFoundPage } from './not-found-page';

/** A chunk that does not load after an update is cured by loading the page again. */
const isStaleChunk = (error: unknown): boolean =>
  error instanceof TypeError && /import|module/i.test(error.message);

export function FaultPage() {
  const error = useRouteError();
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFoundPage />;
  return (
    <main className="page" id="main">
      <div className="blank" role="alert">
        <h1 className="c-brim">
          {isStaleChunk(error) ? 'This page could not be loaded' : 'This page stopped working'}
        </h1>
        <p>Nothing was sent. What you typed in a draft is kept on the server up to the last second.</p>
        <p>If a pump has to be stopped now, stop it by hand.</p>
        <button className="btn p" type="button" onClick={() => window.location.reload()}>
          Load the page again
        </button>{' '}
        <Link className="btn" to="/">
          Go to my ward
        </Link>
      </div>
    </main>
  );
}
