import { existsSync } from 'node:fs';
import { verifyAudit } from '../audit';
import { loadConfig } from '../config';
import { openDatabase } from '../db';

const { databaseFile } = loadConfig(process.env);
if (!existsSync(databaseFile)) {
  console.error(`There is no database at ${databaseFile}.`);
  process.exit(2);
}
const db = openDatabase(databaseFile);
const { intact, entries, firstFault, lastHash } = await verifyAudit(db).finally(() => db.destroy());
if (firstFault !== null) console.error(`Entry ${firstFault.sequence}: ${firstFault.what}`);
console.log(
  intact
    ? `The audit trail is intact: ${entries} entries, last hash ${lastHash ?? 'none'}.`
    : `The audit trail is NOT intact; ${entries} entries before the first fault are.`,
);
process.exitCode = intact ? 0 : 1;
