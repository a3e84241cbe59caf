/**
 * Paths of the client's screens: the server answers these with the page and 200, everything else with the page and 404.
 * `:name` stands for one step of the path.
 */
export const clientRoutes = [
  '/',
  '/sign-in',
  '/briefs',
  '/briefs/new',
  '/briefs/:briefId',
  '/briefs/:briefId/edit',
  '/designs',
  '/designs/new',
  '/designs/:designId',
  '/designs/:designId/:letter',
  '/bench',
  '/bench/runs/:runId',
  '/catalogue',
  '/records',
  '/records/:recordId',
  '/administration',
  '/administration/people',
  '/administration/mail',
  '/administration/audit',
  '/account',
] as const;

const patterns = clientRoutes.map((route) => new RegExp(`^${route.replace(/:\w+/g, '[^/]+')}/?$`));

export const isClientRoute = (path: string): boolean => patterns.some((pattern) => pattern.test(path));
