import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { Download, Printer } from 'lucide-react';
import { Link, useParams } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { stateWords } from '#workflows/revision';
import { recordQuery } from '../features/records/queries';
import { RecordSheet } from '../features/records/record-sheet';
import { recordTone } from '../features/records/record-tone';
import { revisionQuery } from '../features/revision/queries';
import { RevisionActions } from '../features/revision/revision-actions';
import { SmallStrip } from '../features/strip/small-strip';
import { download } from '../lib/download';
import { queryClient } from '../lib/query-client';
import { Button } from '../ui/button';
import { PageBody, PageHeader } from '../ui/page-header';
import { Status } from '../ui/status';

export const loader = ({ params }: LoaderFunctionArgs) =>
  queryClient.query({ ...recordQuery(params.recordId ?? ''), staleTime: 'static' });

export function Component() {
  const { recordId = '' } = useParams();
  const record = useSuspenseQuery(recordQuery(recordId)).data;
  // The steps that a release still knows (supersede, recall) come with its revision; the sheet does not wait for them.
  const revision = useQuery(revisionQuery(record.revisionId));
  return (
    <>
      <div data-no-print>
        <PageHeader
          title={record.designTitle}
          documentTitle={`${record.releaseNumber} ${record.designTitle}`}
          crumbs={[{ label: 'Records', to: '/records' }, { label: record.releaseNumber }]}
          meta={
            <>
              <Status tone={recordTone(record.state)}>{stateWords[record.state]}</Status>
              <span>
                Released from{' '}
                <Link to={`/designs/${record.designId}/${record.letter}`} className="link font-mono">
                  {record.designNumber} {record.letter}
                </Link>
              </span>
            </>
          }
          actions={
            <>
              {revision.data ? (
                <RevisionActions
                  revision={revision.data}
                  only={['supersede', 'recall']}
                  quiet
                  onDone={() => undefined}
                />
              ) : null}
              <Button
                icon={Download}
                onPress={() =>
                  download(
                    `${record.releaseNumber}.json`,
                    JSON.stringify({ digest: record.digest, dossier: record.dossier }, null, 2),
                    'application/json',
                  )
                }
              >
                Download the dossier
              </Button>
              <Button icon={Printer} variant="primary" onPress={() => window.print()}>
                Print the sheet
              </Button>
            </>
          }
        />
      </div>
      <PageBody className="print:p-0">
        <RecordSheet
          record={record}
          strip={<SmallStrip document={record.dossier.document} width={220} height={84} />}
        />
      </PageBody>
    </>
  );
}
