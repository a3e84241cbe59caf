import { createBrowserRouter, redirect } from 'react-router-dom';
import type { RouteObject } from 'react-router-dom';
import { sessionQuery } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { RootError, RouteError } from '../routes/error';
import { Component as NotFound } from '../routes/not-found';
import { FirstPending } from './first-pending';

type LoadScreen = () => Promise<Pick<RouteObject, 'loader' | 'Component'>>;
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

/** Takes loader and component from the file of a screen; a fault of it leaves the rail usable. */
const lazily = (load: LoadScreen): Pick<RouteObject, 'lazy' | 'ErrorBoundary'> => ({
  lazy: async () => {
    const { loader, Component } = await load();
    return { loader, Component };
  },
  ErrorBoundary: RouteError,
});

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
    lazy: () => import('./shell'),
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
