import type { Request } from 'express';
import type { z } from 'zod';
import type { RouteContract } from '#contracts/route';
import type { allRoutes } from '#contracts/routes';
import type { Actor } from '#workflows/revision';

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

/** What a handler is given: parsed by the contract, the actor from the session. */
export interface Input<R extends RouteContract> {
  params: Parsed<R['params']>;
  query: Parsed<R['query']>;
  body: Parsed<R['body']>;
  actor: R['allowed'] extends 'anyone' ? Actor | null : Actor;
  /** For the few that need the session or the response itself; everything else stays away from HTTP. */
  request: Request;
}

export type Answer<R extends RouteContract> = R['answer'] extends z.ZodType ? z.output<R['answer']> : void;

export type Handler<R extends RouteContract> = (input: Input<R>) => Promise<Answer<R>>;

export type RouteName = keyof typeof allRoutes;

/** One handler for every route of the table; a missing one is a type error. */
export type Handlers = { [K in RouteName]: Handler<(typeof allRoutes)[K]> };
