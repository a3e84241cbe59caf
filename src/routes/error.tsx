import { useEffect } from 'react';
import { isRouteErrorResponse, useLocation, useRevalidator, useRouteError } from 'react-router-dom';
import { isRequestError } from '../lib/request-error';
import { ErrorState } from '../ui/error-state';
import { PageBody, PageHeader } from '../ui/page-header';
import { Component as NotFound } from './not-found';

/** A chunk that is gone because a newer version was installed while the page was open. */
const isOutdated = (error: unknown) =>
  error instanceof TypeError && /dynamically imported module|module script|preload/i.test(error.message);

/** Any fault of a screen, inside the shell: the rail stays usable. */
export function RouteError() {
  const error = useRouteError();
  const revalidator = useRevalidator();
  const { pathname } = useLocation();
  useEffect(() => {
    if (!isRequestError(error) && !isRouteErrorResponse(error)) console.warn(`The screen ${pathname} failed`, error);
  }, [error, pathname]);

  if (isRouteErrorResponse(error) && error.status === 404) return <NotFound />;
  if (isRequestError(error, 'unauthenticated'))
    return (
      <PageBody>
        <ErrorState
          title="Your session has ended"
          advice="Sign in again to go on; this page then loads by itself."
          onRetry={() => void revalidator.revalidate()}
        />
      </PageBody>
    );
  const outdated = isOutdated(error);
  return (
    <>
      <PageHeader
        title={
          isRequestError(error, 'notFound')
            ? 'Not found'
            : isRequestError(error, 'forbidden')
              ? 'Not open to you'
              : 'This page could not be shown'
        }
      />
      <PageBody>
        <ErrorState
          error={outdated ? undefined : error}
          title={outdated ? 'A newer version has been installed' : undefined}
          advice={outdated ? 'Reload the page to go on with it.' : undefined}
          kept={outdated ? 'Drafts are saved on the server as you go.' : undefined}
          onRetry={outdated ? () => window.location.reload() : () => void revalidator.revalidate()}
        />
      </PageBody>
    </>
  );
}

/** A fault outside the shell, where there is no rail to go to. */
export function RootError() {
  return (
    <main className="mx-auto max-w-3xl py-10">
      <RouteError />
    </main>
  );
}
