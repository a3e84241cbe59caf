import { AuditTable } from '../features/administration/audit-table';
import { AuditVerification } from '../features/administration/audit-verification';
import { auditQuery, verificationQuery } from '../features/administration/queries';
import { queryClient } from '../lib/query-client';
import { PageBody, Section } from '../ui/page-header';

/** The table waits for nothing but its first page; the check of a long chain runs meanwhile and tells its own faults. */
export const loader = async () => {
  queryClient.query(verificationQuery).catch(() => undefined);
  await queryClient.infiniteQuery({ ...auditQuery, staleTime: 'static' });
  return null;
};

export function Component() {
  return (
    <PageBody>
      <Section title="Audit trail">
        <p className="max-w-prose text-graphite">
          Every change, by whom and when. Entries are only ever added; each carries a hash over itself and the one
          before.
        </p>
        <AuditVerification />
        <AuditTable />
      </Section>
    </PageBody>
  );
}
