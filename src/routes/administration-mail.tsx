import { useSuspenseQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { MailTable } from '../features/administration/mail-table';
import { MessageDialog } from '../features/administration/message-dialog';
import { mailQuery } from '../features/administration/queries';
import { queryClient } from '../lib/query-client';
import { Caution } from '../ui/caution';
import { PageBody, Section } from '../ui/page-header';

export const loader = () => queryClient.query({ ...mailQuery, staleTime: 'static' });

export function Component() {
  const { transport, messages } = useSuspenseQuery({ ...mailQuery, refetchInterval: 15_000 }).data;
  const [search, setSearch] = useSearchParams();
  const open = search.get('message');
  const failed = messages.filter(({ state }) => state === 'failed').length;
  return (
    <PageBody>
      <Section title="Mail">
        {transport === 'kept' ? (
          <Caution severity="info" title="No mail server is set up." className="max-w-3xl">
            Messages are written and kept here to read, and leave this machine for nobody. The README names the SMTP
            settings.
          </Caution>
        ) : (
          <p className="text-graphite">Messages leave through the mail server set up for this installation.</p>
        )}
        {failed > 0 ? (
          <Caution severity="stop" title={`${failed} failed.`} className="max-w-3xl">
            Open a message to see why, and to send it again.
          </Caution>
        ) : null}
        <MailTable messages={messages} />
      </Section>
      {open === null ? null : <MessageDialog messageId={open} onClose={() => setSearch({}, { replace: true })} />}
    </PageBody>
  );
}
