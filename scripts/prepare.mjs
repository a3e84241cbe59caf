import { existsSync } from 'node:fs';
import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildIfStale } from './build-if-stale.mjs';

/** Builds what is missing, brings the database up to date, and fills an empty one: the first half of starting. */
export async function prepare() {
  process.chdir(dirname(dirname(fileURLToPath(import.meta.url))));
  const unknown = process.argv.slice(2).filter((word) => word !== '--no-demo');
  if (unknown.length > 0) {
    console.error(
      `Not understood: ${unknown.join(' ')}. The one option is --no-demo: an empty database stays without demonstration data.`,
    );
    process.exit(1);
  }
  if (!existsSync('node_modules')) {
    console.error('The packages are not installed: npm ci');
    process.exit(1);
  }
  buildIfStale();
  process.env.NODE_ENV = 'production';
  process.setSourceMapsEnabled(true);
  const { setUp } = await import('../dist/server/setup.js');
  try {
    await setUp(process.env, { demo: !process.argv.includes('--no-demo') });
  } catch (error) {
    console.error(error.name === 'ConfigError' ? error.message : error);
    process.exit(1);
  }
}
