import type { Allowed } from '#contracts/route';
import type { Role } from '#workflows/revision';

/** Whether a signed-in person with these roles may call a route. */
export const mayCall = (allowed: Allowed, roles: readonly Role[]): boolean =>
  typeof allowed === 'string' || allowed.some((role) => roles.includes(role));
