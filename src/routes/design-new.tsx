import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { briefsQuery } from '../features/briefs/queries';
import { DesignForm } from '../features/designs/design-form';
import { revisionPath, useCreateDesign } from '../features/designs/queries';
import { revisionQuery } from '../features/revision/queries';
import { SmallStrip } from '../features/strip/small-strip';
import { queryClient } from '../lib/query-client';
import { ButtonLink } from '../ui/button';
import { EmptyState } from '../ui/empty-state';
import { PageBody, PageHeader } from '../ui/page-header';
import { Pending } from '../ui/pending';

export async function loader({ request }: LoaderFunctionArgs) {
  const from = new URL(request.url).searchParams.get('from');
  await Promise.all([
    queryClient.query({ ...briefsQuery, staleTime: 'static' }),
    from === null ? null : queryClient.query({ ...revisionQuery(from), staleTime: 'static' }),
  ]);
  return null;
}

export function Component() {
  const [search] = useSearchParams();
  const from = search.get('from');
  const { briefs, mayCreate } = useSuspenseQuery(briefsQuery).data;
  const origin = useQuery({ ...revisionQuery(from ?? ''), enabled: from !== null }).data;
  const create = useCreateDesign();
  const navigate = useNavigate();
  const start = async ({ title, briefId }: { title: string; briefId: string }) => {
    const document = origin?.document as Record<string, unknown> | undefined;
    const design = await create.mutateAsync({
      title,
      briefId,
      ...(document ? { document: { ...document, title } } : {}),
    });
    const [first] = design.revisions;
    void navigate(first ? revisionPath(design.id, first.letter) : `/designs/${design.id}`);
  };
  const variant = from !== null;
  return (
    <>
      <PageHeader
        title={variant ? 'Make a variant' : 'Start a design'}
        crumbs={[{ label: 'Designs', to: '/designs' }]}
        meta={
          origin
            ? `A new design that starts as a copy of ${origin.design.number} ${origin.letter} and then goes its own way.`
            : 'One generator for one brief. Revision A is drafted at once.'
        }
      />
      <PageBody>
        {briefs.length === 0 ? (
          <EmptyState
            title="A design answers a brief, and there is none yet."
            action={
              mayCreate ? (
                <ButtonLink to="/briefs/new" variant="primary">
                  Write a brief
                </ButtonLink>
              ) : undefined
            }
          >
            The brief says what vibration there is, what power is needed, and how much room there is.
          </EmptyState>
        ) : variant && !origin ? (
          <Pending label="Loading the design that this starts from" />
        ) : (
          <div className="flex flex-wrap gap-x-12 gap-y-6">
            <div className="min-w-0 flex-1 basis-96">
              <DesignForm
                briefs={briefs}
                briefId={origin?.brief.id ?? search.get('brief') ?? ''}
                title={origin ? `${origin.design.title}, variant` : ''}
                start={
                  origin
                    ? 'Everything typed in the original is taken over; the original itself stays as it is.'
                    : 'It starts from a device that fits the envelope and is tuned to the strongest tone of the brief; change every value from there.'
                }
                onCreate={start}
              />
            </div>
            {origin ? (
              <div className="sheet self-start p-4">
                <SmallStrip document={origin.document} width={320} height={130} />
              </div>
            ) : null}
          </div>
        )}
      </PageBody>
    </>
  );
}
