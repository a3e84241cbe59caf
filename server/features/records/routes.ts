import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { listRecords, readRecord } from './service';

export const recordHandlers = ({ db }: Deps): Pick<Handlers, 'listRecords' | 'readRecord'> => ({
  listRecords: async () => ({ records: await listRecords(db) }),
  readRecord: ({ params }) => readRecord(db, params.recordId),
});
