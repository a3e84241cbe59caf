import { useSuspenseQuery } from '@tanstack/react-query';
import { deskQuery } from '../features/desk/queries';
import { DeskSheet } from '../features/desk/desk-sheet';
import { useSession } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { ButtonLink } from '../ui/button';
import { PageBody, PageHeader } from '../ui/page-header';

export const loader = () => queryClient.query({ ...deskQuery, staleTime: 'static' });

export function Component() {
  const desk = useSuspenseQuery({ ...deskQuery, refetchInterval: 60_000 }).data;
  const { me } = useSession();
  const count = desk.waitsForMe.length;
  return (
    <>
      <PageHeader
        title={`${me.name}’s desk`}
        documentTitle={count === 0 ? 'Desk' : `(${count}) Desk`}
        meta={
          count === 0 ? 'Nothing waits for you.' : `${count} ${count === 1 ? 'thing waits' : 'things wait'} for you.`
        }
      />
      <PageBody>
        <DeskSheet
          desk={desk}
          firstSteps={
            <div className="flex flex-wrap gap-2.5">
              {me.mayEnter.includes('briefs') ? <ButtonLink to="/briefs">Look at the briefs</ButtonLink> : null}
              {me.mayEnter.includes('designs') ? <ButtonLink to="/designs">Look at the designs</ButtonLink> : null}
              {me.mayEnter.includes('records') ? <ButtonLink to="/records">Look at the records</ButtonLink> : null}
            </div>
          }
        />
      </PageBody>
    </>
  );
}
