import { Router, json } from 'express';
import type { Request, RequestHandler } from 'express';
import type { z } from 'zod';
import type { RouteContract } from '#contracts/route';
import { roleWords } from '#workflows/revision';
import { DomainError, forbidden, invalid, unauthenticated } from '../errors';
import { mayCall } from './allowed';
import { bodyLimit } from './body-limit';
import type { Handler } from './handlers';
import { plainWords, toIssues } from './issues';
import { actorOf } from './session-user';

interface CsrfCheck {
  accepts: (request: Request) => boolean;
}

/** Who asks, with which role, with which token: before anything that was sent is looked at. */
const gate =
  ({ allowed, method }: RouteContract, csrf: CsrfCheck): RequestHandler =>
  (request, _response, next) => {
    const actor = actorOf(request);
    if (allowed !== 'anyone' && actor === null) throw unauthenticated();
    if (typeof allowed !== 'string' && actor !== null && !mayCall(allowed, actor.roles)) {
      throw forbidden(`This needs the role ${allowed.map((role) => roleWords[role]).join(' or ')}.`);
    }
    if (method !== 'get' && !csrf.accepts(request)) {
      throw new DomainError('csrf', 'The page is out of date. Load it again, then repeat the step.');
    }
    next();
  };

function parsed(schema: z.ZodType | undefined, input: unknown): unknown {
  if (schema === undefined) return undefined;
  const read = schema.safeParse(input, { error: plainWords });
  if (!read.success) throw invalid(toIssues(read.error, input));
  return read.data;
}

function parsedBody({ body }: RouteContract, request: Request): unknown {
  if (body !== undefined && request.body === undefined) {
    throw invalid(
      [{ path: '', message: 'Send a body with Content-Type: application/json.' }],
      'The request has no JSON body.',
    );
  }
  return parsed(body, request.body);
}

const answer =
  (contract: RouteContract, handler: Handler<RouteContract>): RequestHandler =>
  async (request, response) => {
    const result: unknown = await handler({
      params: parsed(contract.params, request.params),
      query: parsed(contract.query, request.query),
      body: parsedBody(contract, request),
      actor: actorOf(request),
      request,
    } as Parameters<typeof handler>[0]);
    response.status(contract.status ?? 200);
    if (contract.status === 204) response.end();
    else response.json(result);
  };

/**
 * Serves every route of the table by its handler. In this order: who asks (401), with which role (403), with which token
 * (403), what was sent (422); then the handler, whose answer is sent as it is.
 */
export function mount(routes: Record<string, RouteContract>, handlers: object, csrf: CsrfCheck): Router {
  const router = Router({ caseSensitive: true });
  const readJson = json({ limit: bodyLimit.bytes });
  for (const [name, contract] of Object.entries(routes)) {
    const handler = (handlers as Record<string, Handler<RouteContract> | undefined>)[name];
    if (handler === undefined) throw new Error(`The route ${name} has no handler.`);
    router[contract.method](contract.path, gate(contract, csrf), readJson, answer(contract, handler));
  }
  return router;
}
