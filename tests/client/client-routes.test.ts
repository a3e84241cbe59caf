import type { RouteObject } from 'react-router-dom';
import { expect, test } from 'vitest';
import { clientRoutes } from '#contracts/client-routes';
import { router } from '../../src/app/router';

/** Full paths of all screens; what leads to “not found” is none. */
const pathsOf = (routes: readonly RouteObject[], above = ''): string[] =>
  routes.flatMap(({ path = '', children = [] }) => {
    const own = path.startsWith('/') ? path : `${above.replace(/\/$/, '')}/${path}`;
    if (path === '*') return [];
    return [own === '/' ? own : own.replace(/\/$/, ''), ...pathsOf(children, own)];
  });

test('the server answers 200 for exactly the paths that the client has a screen for', () => {
  expect([...new Set(pathsOf(router.routes))].sort()).toEqual([...clientRoutes].sort());
});
