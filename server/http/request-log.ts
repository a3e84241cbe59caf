import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

const given = /^[\w-]{8,64}$/;

/** One line for each request, with an id that also goes out as X-Request-Id and into error answers. */
export const requestLog = (logger: Logger): RequestHandler =>
  pinoHttp({
    logger,
    genReqId(request, response) {
      const sent = request.headers['x-request-id'];
      const id = typeof sent === 'string' && given.test(sent) ? sent : randomUUID();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    customLogLevel: (_request, response, error) =>
      error !== undefined || response.statusCode >= 500 ? 'error' : response.statusCode >= 400 ? 'info' : 'debug',
    serializers: {
      req: ({ id, method, url, remoteAddress }: Record<string, unknown>) => ({ id, method, url, remoteAddress }),
      res: ({ statusCode }: Record<string, unknown>) => ({ statusCode }),
    },
  });
