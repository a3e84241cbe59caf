import { Outlet, redirect, useLocation } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { AdministrationFrame } from '../features/administration/administration-frame';
import { sessionQuery } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { RequestError } from '../lib/request-error';
import { PageHeader } from '../ui/page-header';

export const loader = async ({ request }: LoaderFunctionArgs) => {
  const { me } = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
  if (!me?.mayEnter.includes('administration'))
    throw new RequestError(403, 'forbidden', 'Administration is open to administrators.');
  return /^\/administration\/?$/.test(new URL(request.url).pathname) ? redirect('/administration/people') : null;
};

const titles: Record<string, string> = {
  '/administration/people': 'People',
  '/administration/mail': 'Mail',
  '/administration/audit': 'Audit trail',
};

export function Component() {
  const { pathname } = useLocation();
  const part = titles[pathname.replace(/\/$/, '')];
  return (
    <>
      <PageHeader title="Administration" documentTitle={part ? `${part}, administration` : 'Administration'} />
      <AdministrationFrame>
        <Outlet />
      </AdministrationFrame>
    </>
  );
}
