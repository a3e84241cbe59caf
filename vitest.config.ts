import { defineConfig } from 'vitest/config';
import react from '@vitejs/plugin-react';

const node = (name: string, extra: Record<string, unknown> = {}) => ({
  extends: true as const,
  test: { name, environment: 'node' as const, include: [`tests/${name}/**/*.test.ts`], ...extra },
});

export default defineConfig({
  test: {
    testTimeout: 30_000,
    hookTimeout: 60_000,
    projects: [
      node('physics', { testTimeout: 120_000 }),
      node('workflows'),
      node('server'),
      node('migrations'),
      {
        extends: true,
        plugins: [react()],
        test: {
          name: 'client',
          environment: 'jsdom',
          include: ['tests/client/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/support/client-setup.ts'],
        },
      },
      node('e2e', { maxConcurrency: 2, testTimeout: 240_000, hookTimeout: 120_000, fileParallelism: false }),
      node('tooling', { testTimeout: 120_000 }),
    ],
  },
});
