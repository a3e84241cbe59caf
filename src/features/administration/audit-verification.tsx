import { useQuery } from '@tanstack/react-query';
import { ShieldCheck } from 'lucide-react';
import { formatAgo, formatCount } from '../../lib/format';
import { messageOf } from '../../lib/request-error';
import { Button } from '../../ui/button';
import { Status } from '../../ui/status';
import { verificationQuery } from './queries';

/** Whether every entry still fits the hash chain, as checked when the page was opened or on demand. */
export function AuditVerification() {
  const { data, error, isFetching, refetch, dataUpdatedAt } = useQuery(verificationQuery);
  return (
    <div className="sheet flex flex-wrap items-start justify-between gap-x-6 gap-y-3 p-4" aria-busy={isFetching}>
      <div className="min-w-0" role="status">
        {data === undefined ? (
          <p className="text-graphite">{error ? messageOf(error) : 'Checking the hash chain'}</p>
        ) : (
          <>
            <p>
              <Status tone={data.intact ? 'good' : 'bad'}>
                {data.intact ? 'The chain is intact' : 'The chain is broken'}
              </Status>
              <span className="ml-3 text-graphite">
                {formatCount(data.entries, 'entry', 'entries')} checked {formatAgo(new Date(dataUpdatedAt))}
              </span>
            </p>
            {data.firstFault === null ? null : (
              <p className="mt-1">
                First fault at entry <span className="font-mono">{data.firstFault.sequence}</span>:{' '}
                {data.firstFault.what}
              </p>
            )}
            {data.lastHash === null ? null : (
              <p className="mt-1 text-sm text-graphite">
                Last hash <code className="wrap-anywhere">{data.lastHash}</code>. Noted outside, it also shows a chain
                rewritten as a whole.
              </p>
            )}
          </>
        )}
      </div>
      <Button icon={ShieldCheck} pending={isFetching} onPress={() => void refetch()}>
        Check the chain
      </Button>
    </div>
  );
}
