import cookieParser from 'cookie-parser';
import express from 'express';
import type { Express } from 'express';
import helmet from 'helmet';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { allRoutes } from '#contracts/routes';
import type { Config } from './config';
import { notFound } from './errors';
import { auditHandlers } from './features/audit/routes';
import { authHandlers } from './features/auth/routes';
import { briefHandlers } from './features/briefs/routes';
import { catalogueHandlers } from './features/catalogue/routes';
import { designHandlers } from './features/designs/routes';
import { deskHandlers } from './features/desk/routes';
import { estimateHandlers } from './features/estimates/routes';
import { instrumentHandlers } from './features/instruments/routes';
import { mailHandlers } from './features/mail/routes';
import { peopleHandlers } from './features/people/routes';
import { recordHandlers } from './features/records/routes';
import { revisionHandlers } from './features/revisions/routes';
import { runHandlers } from './features/runs/routes';
import { contentPolicy } from './http/content-policy';
import { csrfProtection } from './http/csrf';
import { errorHandler } from './http/error-handler';
import type { Handlers } from './http/handlers';
import { mount } from './http/mount';
import { pages } from './http/pages';
import { requestLog } from './http/request-log';
import { sessions } from './http/sessions';
import { systemHandlers } from './http/system-routes';
import type { Estimator } from './jobs/estimator';

/** What everything is made of. Nothing in the server reaches for a global instead. */
export interface Deps {
  db: Knex;
  config: Config;
  log: Logger;
  estimator: Estimator;
  now: () => Date;
}

const handlersFor = (deps: Deps): Handlers => ({
  ...systemHandlers(deps),
  ...authHandlers(deps),
  ...peopleHandlers(deps),
  ...auditHandlers(deps),
  ...mailHandlers(deps),
  ...briefHandlers(deps),
  ...designHandlers(deps),
  ...revisionHandlers(deps),
  ...estimateHandlers(deps),
  ...runHandlers(deps),
  ...instrumentHandlers(deps),
  ...catalogueHandlers(),
  ...recordHandlers(deps),
  ...deskHandlers(deps),
});

/** Wires the whole server; listens to nothing. */
export function createApp(deps: Deps): Express {
  const { config } = deps;
  const app = express();
  app.set('trust proxy', config.trustedProxies);
  app.set('etag', false);
  app.use(requestLog(deps.log), helmet(contentPolicy(config)));
  app.use(
    '/api',
    (_request, response, next) => {
      response.set('Cache-Control', 'no-store');
      next();
    },
    cookieParser(),
    ...sessions(deps),
    mount(allRoutes, handlersFor(deps), csrfProtection(config)),
    () => {
      throw notFound('This address of the interface');
    },
  );
  app.use(pages(config.clientDir));
  app.use(errorHandler);
  return app;
}
