import type BetterSqlite3 from 'better-sqlite3';
import type { Knex } from 'knex';

interface OpenedClient {
  acquireConnection(): Promise<BetterSqlite3.Database>;
  releaseConnection(connection: BetterSqlite3.Database): Promise<void>;
  connectionSettings: { filename: string | Buffer };
}

/** Keeps the database in memory as it is now; the returned function brings it back, however much was written since. */
export async function snapshot(db: Knex): Promise<() => Promise<void>> {
  const client = db.client as OpenedClient;
  const connection = await client.acquireConnection();
  const kept = connection.serialize();
  await client.releaseConnection(connection);
  return async () => {
    await db.destroy();
    client.connectionSettings.filename = kept;
    db.initialize();
  };
}
