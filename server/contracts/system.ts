import { z } from 'zod';
import { route } from './route';

export const systemRoutes = {
  readHealth: route({
    method: 'get',
    path: '/health',
    summary: 'Whether the server answers',
    allowed: 'anyone',
    answer: z.strictObject({ ok: z.literal(true), version: z.string(), engine: z.string() }),
  }),
  readOpenApi: route({
    method: 'get',
    path: '/openapi.json',
    summary: 'This interface as OpenAPI 3.1',
    allowed: 'anyone',
    answer: z.looseObject({ openapi: z.string() }),
  }),
};
