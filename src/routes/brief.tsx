import { useSuspenseQuery } from '@tanstack/react-query';
import { PencilRuler } from 'lucide-react';
import { useNavigate, useParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { designRoutes } from '#contracts/designs';
import { roleWords } from '#workflows/revision';
import { BriefSheet } from '../features/briefs/brief-sheet';
import { briefQuery } from '../features/briefs/queries';
import { useSession } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { ActionButton } from '../ui/action-button';
import { PageBody, PageHeader } from '../ui/page-header';

export const loader = ({ params }: LoaderFunctionArgs) =>
  queryClient.query({ ...briefQuery(params.briefId ?? ''), staleTime: 'static' });

export function Component() {
  const { briefId = '' } = useParams();
  const brief = useSuspenseQuery(briefQuery(briefId)).data;
  const navigate = useNavigate();
  const { me } = useSession();
  const starters = designRoutes.createDesign.allowed;
  const whyNotStart = starters.some((role) => me.roles.includes(role))
    ? null
    : `This needs the role ${starters.map((role) => roleWords[role]).join(' or ')}.`;
  const startDesign = (variant: 'primary' | 'secondary') => (
    <ActionButton
      variant={variant}
      icon={PencilRuler}
      whyNot={whyNotStart}
      onPress={() => void navigate(`/designs/new?brief=${brief.id}`)}
    >
      Start a design
    </ActionButton>
  );
  return (
    <>
      <PageHeader
        title={brief.document.title}
        documentTitle={`${brief.number} ${brief.document.title}`}
        crumbs={[{ label: 'Briefs', to: '/briefs' }, { label: brief.number }]}
        meta={[brief.document.machine, brief.document.place].filter(Boolean).join(', ') || undefined}
        actions={
          <>
            <ActionButton
              whyNot={brief.mayEdit ? null : (brief.whyNotEdit ?? 'Your roles do not include changing briefs.')}
              reason="tooltip"
              onPress={() => void navigate(`/briefs/${brief.id}/edit`)}
            >
              Change the brief
            </ActionButton>
            {startDesign('primary')}
          </>
        }
      />
      <PageBody>
        <BriefSheet brief={brief} startDesign={brief.designs.length === 0 ? startDesign('secondary') : null} />
      </PageBody>
    </>
  );
}
