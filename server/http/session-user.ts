import type { Request } from 'express';
import type { Actor, Role } from '#workflows/revision';

/** The signed-in person as read from the database for this request. */
export interface SignedIn {
  id: string;
  name: string;
  email: string;
  roles: Role[];
}

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- passport's types are extended in this way only
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type -- gives passport's empty interface its members
    interface User extends SignedIn {}
  }
}

export const actorOf = ({ user }: Request): Actor | null =>
  user === undefined ? null : { id: user.id, roles: user.roles };
