import type { Knex } from 'knex';

/** The record that the release of a revision left; undefined where it was never released. */
export const recordOfRevision = (
  db: Knex,
  revisionId: string,
): Promise<{ id: string; release_number: string } | undefined> =>
  db('records')
    .where({ revision_id: revisionId })
    .first<{ id: string; release_number: string } | undefined>('id', 'release_number');
