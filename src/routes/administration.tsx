import { Outlet, redirect, useLocation } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { AdministrationFrame } from '../features/administration/administration-frame';
import { PageHeader } from '../ui/page-header';

export const loader = ({ request }: LoaderFunctionArgs) =>
  /^\/administration\/?$/.test(new URL(request.url).pathname) ? redirect('/administration/people') : null;

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
