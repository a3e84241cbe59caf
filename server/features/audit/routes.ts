import type { AuditEntry } from '#contracts/audit';
import type { Deps } from '../../app';
import { AuditDetail, verifyAudit } from '../../audit';
import type { AuditRow } from '../../audit';
import type { Handlers } from '../../http/handlers';
import { personNames } from '../people/reads';

export const auditHandlers = ({ db }: Deps): Pick<Handlers, 'listAudit' | 'verifyAudit'> => ({
  async listAudit({ query }) {
    const rows = db<AuditRow>('audit_entries').orderBy('sequence', 'desc').limit(query.limit);
    if (query.before !== undefined) rows.where('sequence', '<', query.before);
    const found = await rows;
    const names = await personNames(
      db,
      found.map(({ actor_id }) => actor_id),
    );
    return {
      entries: found.map((row): AuditEntry => ({
        sequence: row.sequence,
        at: row.at,
        by: names.get(row.actor_id ?? '') ?? null,
        action: row.action,
        subject: row.subject,
        subjectId: row.subject_id,
        detail: AuditDetail.parse(JSON.parse(row.detail)),
        hash: row.hash,
      })),
    };
  },
  verifyAudit: () => verifyAudit(db),
});
