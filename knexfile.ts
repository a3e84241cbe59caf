import { loadConfig } from './server/config';
import { knexSettings } from './server/db';

/** Used by the Knex command line; the server itself takes the same settings from server/db.ts. */
export default knexSettings(loadConfig(process.env).databaseFile);
