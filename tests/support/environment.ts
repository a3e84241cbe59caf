/** The environment for a program started by a test: without what the test runner puts there (its BASE_URL is no address). */
export function programEnvironment(more: Record<string, string> = {}): NodeJS.ProcessEnv {
  const { BASE_URL: _runners, NODE_ENV: _test, VITEST: _vitest, ...environment } = process.env;
  return { ...environment, ...more };
}
