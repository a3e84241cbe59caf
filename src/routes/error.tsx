import { useEffect } from 'react';
import { isRouteErrorResponse, useLocation, useRevalidator, useRouteError } from 'react-router-dom';
import { isRequestError } from '../lib/request-error';
import { ErrorState } from '../ui/error-state';
import type { ErrorStateProps } from '../ui/error-state';
import { PageBody, PageHeader } from '../ui/page-header';
import { Component as NotFound } from './not-found';

/** The file of a screen did not arrive: no network, or it is gone because a newer version was installed meanwhile. */
const isUnfetched = (error: unknown) =>
  error instanceof TypeError && /dynamically imported module|module script|preload/i.test(error.message);

/** Any fault of a screen, inside the shell: the rail stays usable. */
export function RouteError() {
  const error = useRouteError();
  const revalidator = useRevalidator();
  const { pathname } = useLocation();
  useEffect(() => {
    if (!isRequestError(error) && !isRouteErrorResponse(error)) console.warn(`The screen ${pathname} failed`, error);
  }, [error, pathname]);

  useEffect(() => {
    const retryWhenBack = () => void revalidator.revalidate();
    window.addEventListener('online', retryWhenBack);
    return () => window.removeEventListener('online', retryWhenBack);
  }, [revalidator]);

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
  const retry = () => void revalidator.revalidate();
  if (isUnfetched(error))
    return navigator.onLine ? (
      <Fault
        heading="This page could not be fetched"
        title="A newer version may have been installed"
        advice="Reload to go on with it. What was saved before is safe."
        onRetry={() => window.location.reload()}
      />
    ) : (
      <Fault
        heading="This page could not be fetched"
        title="No connection to the server"
        advice="The page loads by itself once the network is back."
        onRetry={retry}
      />
    );
  const heading = isRequestError(error, 'notFound')
    ? 'Not found'
    : isRequestError(error, 'forbidden')
      ? 'Not open to you'
      : 'This page could not be shown';
  return <Fault heading={heading} error={error} onRetry={retry} />;
}

function Fault({ heading, ...state }: { heading: string } & ErrorStateProps) {
  return (
    <>
      <PageHeader title={heading} />
      <PageBody>
        <ErrorState {...state} />
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
