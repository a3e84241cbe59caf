import { createElement } from 'react';
import type { ComponentType } from 'react';
import { createBrowserRouter, redirect } from 'react-router-dom';
import type { LoaderFunction, RouteObject } from 'react-router-dom';
import { sessionQuery } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { RootError, RouteError } from '../routes/error';
import { Component as NotFound } from '../routes/not-found';
import { FirstPending } from './first-pending';

type LoadScreen = () => Promise<{ loader?: LoaderFunction; Component?: ComponentType }>;
interface Screen {
  path: string;
  load: LoadScreen;
  children?: readonly Screen[];
}

/** Every screen behind the sign-in: its path, and its file, fetched when somebody goes there. */
const screens: readonly Screen[] = [
  { path: 'briefs', load: () => import('../routes/briefs') },
  { path: 'briefs/new', load: () => import('../routes/brief-new') },
  { path: 'briefs/:briefId', load: () => import('../routes/brief') },
  { path: 'briefs/:briefId/edit', load: () => import('../routes/brief-edit') },
  { path: 'designs', load: () => import('../routes/designs') },
  { path: 'designs/new', load: () => import('../routes/design-new') },
  { path: 'designs/:designId', load: () => import('../routes/design') },
  { path: 'designs/:designId/:letter', load: () => import('../routes/revision') },
  { path: 'bench', load: () => import('../routes/bench') },
  { path: 'bench/runs/:runId', load: () => import('../routes/run') },
  { path: 'catalogue', load: () => import('../routes/catalogue') },
  { path: 'records', load: () => import('../routes/records') },
  { path: 'records/:recordId', load: () => import('../routes/record') },
  {
    path: 'administration',
    load: () => import('../routes/administration'),
    children: [
      { path: 'people', load: () => import('../routes/administration-people') },
      { path: 'mail', load: () => import('../routes/administration-mail') },
      { path: 'audit', load: () => import('../routes/administration-audit') },
    ],
  },
  { path: 'account', load: () => import('../routes/account') },
];

/**
 * Fetches the file of a screen in a loader, then runs the screen's own loader. React Router's `lazy` would do the same, but
 * leaves the page blank where the file cannot be fetched; a failed loader is shown, and tried again on demand.
 */
function lazily(load: LoadScreen): Pick<RouteObject, 'loader' | 'Component' | 'ErrorBoundary'> {
  let screen: Awaited<ReturnType<LoadScreen>> = {};
  return {
    loader: async (request) => {
      screen = await load();
      return screen.loader?.(request) ?? null;
    },
    Component: () => (screen.Component ? createElement(screen.Component) : null),
    ErrorBoundary: RouteError,
  };
}

const routeOf = ({ path, load, children }: Screen): RouteObject => ({
  path,
  ...lazily(load),
  ...(children ? { children: children.map(routeOf) } : {}),
});

export const router = createBrowserRouter([
  {
    path: '/sign-in',
    ...lazily(() => import('../routes/sign-in')),
    ErrorBoundary: RootError,
    HydrateFallback: FirstPending,
  },
  {
    id: 'shell',
    path: '/',
    ...lazily(() => import('./shell')),
    ErrorBoundary: RootError,
    HydrateFallback: FirstPending,
    // Before any loader of the screens: who is not signed in asks the server for nothing else.
    middleware: [
      async ({ request }) => {
        const session = await queryClient.query({ ...sessionQuery, staleTime: 'static' });
        if (session.me) return;
        const { pathname, search } = new URL(request.url);
        const next = `${pathname}${search}`;
        throw redirect(next === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(next)}`);
      },
    ],
    children: [
      { index: true, ...lazily(() => import('../routes/desk')) },
      ...screens.map(routeOf),
      { path: '*', Component: NotFound },
    ],
  },
]);
