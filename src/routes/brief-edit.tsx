import { useSuspenseQuery } from '@tanstack/react-query';
import { useNavigate, useParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { BriefEditor } from '../features/briefs/brief-editor';
import { briefQuery, useChangeBrief } from '../features/briefs/queries';
import { queryClient } from '../lib/query-client';
import { ButtonLink } from '../ui/button';
import { Caution } from '../ui/caution';
import { PageBody, PageHeader } from '../ui/page-header';
import { tell } from '../ui/toast';

/** Asked anew each time: one edits what stands on the server, not what was seen a while ago. */
export const loader = ({ params }: LoaderFunctionArgs) =>
  queryClient.query({ ...briefQuery(params.briefId ?? ''), staleTime: 0 });

export function Component() {
  const { briefId = '' } = useParams();
  const brief = useSuspenseQuery(briefQuery(briefId)).data;
  const change = useChangeBrief(briefId);
  const navigate = useNavigate();
  const crumbs = [{ label: 'Briefs', to: '/briefs' }, { label: brief.number }];
  const back = <ButtonLink to={`/briefs/${briefId}`}>Cancel</ButtonLink>;
  if (!brief.mayEdit)
    return (
      <>
        <PageHeader title={brief.document.title} crumbs={crumbs} actions={back} />
        <PageBody>
          <Caution title="This brief cannot be changed by you.">{brief.whyNotEdit}</Caution>
        </PageBody>
      </>
    );
  return (
    <BriefEditor
      key={briefId}
      brief={brief}
      saveLabel="Save the brief"
      save={(document, version) => change.mutateAsync({ version: version ?? brief.version, document })}
      onSaved={(saved) => {
        tell.done(`${saved.number} saved as version ${saved.version}`);
        void navigate(`/briefs/${saved.id}`);
      }}
      header={(save) => (
        <PageHeader
          title={brief.document.title}
          documentTitle={`Change ${brief.number}`}
          crumbs={crumbs}
          meta={`Version ${brief.version}. Revisions that are submitted keep the version they were submitted with.`}
          actions={
            <>
              {back}
              {save}
            </>
          }
        />
      )}
    />
  );
}
