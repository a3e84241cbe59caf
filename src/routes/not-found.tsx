import { useLocation } from 'react-router-dom';
import { ButtonLink } from '../ui/button';
import { PageBody, PageHeader } from '../ui/page-header';

/** An address that leads nowhere. */
export function Component() {
  const { pathname } = useLocation();
  return (
    <>
      <PageHeader title="There is no such page" documentTitle="Not found" />
      <PageBody className="flex max-w-2xl flex-col items-start gap-4">
        <p>
          Nothing is kept under <code className="wrap-anywhere">{pathname}</code>. The address may be mistyped, or what
          it led to no longer exists.
        </p>
        <p className="text-graphite">Nothing was lost. The rail leads to everything you may enter.</p>
        <ButtonLink to="/" variant="primary">
          Go to the desk
        </ButtonLink>
      </PageBody>
    </>
  );
}
