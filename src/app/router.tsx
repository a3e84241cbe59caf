import { createBrowserRouter, redirect } from 'react-router-dom';
import type { RouteObject } from 'react-router-dom';
import { sessionQuery } from '../features/session/queries';
import { queryClient } from '../lib/query-client';
import { RootError, RouteError } from '../routes/error';
import { Component as NotFound } from '../routes/not-found';
import { FirstPending } from './first-pending';

type Lazy = NonNullable<RouteObject['lazy']>;
const screenFiles = import.meta.glob<Awaited<ReturnType<Extract<Lazy, () => unknown>>>>([
  '../routes/*.tsx',
  '!../routes/error.tsx',
  '!../routes/not-found.tsx',
]);

/** Path and file (src/routes/<name>.tsx) of every screen behind the sign-in. */
const screens: readonly { path: string; name: string; children?: readonly { path: string; name: string }[] }[] = [
  { path: 'briefs', name: 'briefs' },
  { path: 'briefs/new', name: 'brief-new' },
  { path: 'briefs/:briefId', name: 'brief' },
  { path: 'briefs/:briefId/edit', name: 'brief-edit' },
  { path: 'designs', name: 'designs' },
  { path: 'designs/new', name: 'design-new' },
  { path: 'designs/:designId', name: 'design' },
  { path: 'designs/:designId/:letter', name: 'revision' },
  { path: 'bench', name: 'bench' },
  { path: 'bench/runs/:runId', name: 'run' },
  { path: 'catalogue', name: 'catalogue' },
  { path: 'records', name: 'records' },
  { path: 'records/:recordId', name: 'record' },
  {
    path: 'administration',
    name: 'administration',
    children: [
      { path: 'people', name: 'administration-people' },
      { path: 'mail', name: 'administration-mail' },
      { path: 'audit', name: 'administration-audit' },
    ],
  },
  { path: 'account', name: 'account' },
];

function screen(name: string): Pick<RouteObject, 'lazy' | 'Component' | 'ErrorBoundary'> {
  const file = screenFiles[`../routes/${name}.tsx`];
  return file ? { lazy: file, ErrorBoundary: RouteError } : { Component: NotFound, ErrorBoundary: RouteError };
}

export const router = createBrowserRouter([
  { path: '/sign-in', ...screen('sign-in'), ErrorBoundary: RootError, HydrateFallback: FirstPending },
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
      { index: true, ...screen('desk') },
      ...screens.map(({ path, name, children }) => ({
        path,
        ...screen(name),
        ...(children ? { children: children.map((child) => ({ path: child.path, ...screen(child.name) })) } : {}),
      })),
      { path: '*', Component: NotFound },
    ],
  },
]);
