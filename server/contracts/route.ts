import type { z } from 'zod';
import type { Role } from '#workflows/revision';

/** Who may call a route: anybody, anybody signed in, or holders of one of the roles. */
export type Allowed = 'anyone' | 'signedIn' | readonly Role[];

export interface RouteContract {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Express path with `:name` parameters, below /api. */
  path: string;
  summary: string;
  allowed: Allowed;
  params?: z.ZodObject;
  query?: z.ZodObject;
  body?: z.ZodType;
  /** Status of the good answer; 200 unless said, 204 has no body. */
  status?: 200 | 201 | 204;
  answer?: z.ZodType;
}

/** Keeps the exact types of a contract while checking its form. */
export const route = <const R extends RouteContract>(contract: R): R => contract;
