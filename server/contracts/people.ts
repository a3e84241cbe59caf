import { z } from 'zod';
import { Role } from '#workflows/revision';
import { Id, Line, Time, Version } from './basics';
import { route } from './route';
import { NewPassword } from './session';

export const Person = z.strictObject({
  id: Id,
  name: z.string(),
  email: z.string(),
  roles: z.array(Role),
  active: z.boolean(),
  version: Version,
  createdAt: Time,
  lastSignInAt: Time.nullable(),
});
export type Person = z.infer<typeof Person>;

const Email = z.email('This is not an e-mail address.').max(254);

export const PersonCreate = z.strictObject({
  name: Line,
  email: Email,
  roles: z.array(Role),
  initialPassword: NewPassword,
});
export type PersonCreate = z.infer<typeof PersonCreate>;

/** A password can be set by nobody but its owner: an administrator gives the first one only. */
export const PersonChange = z.strictObject({
  version: Version,
  name: Line,
  email: Email,
  roles: z.array(Role),
  active: z.boolean(),
});
export type PersonChange = z.infer<typeof PersonChange>;

const params = z.strictObject({ personId: Id });
export const peopleRoutes = {
  listPeople: route({
    method: 'get',
    path: '/people',
    summary: 'Everybody with an account',
    allowed: ['administrator'],
    answer: z.strictObject({ people: z.array(Person) }),
  }),
  createPerson: route({
    method: 'post',
    path: '/people',
    summary: 'Add a person',
    allowed: ['administrator'],
    body: PersonCreate,
    status: 201,
    answer: Person,
  }),
  changePerson: route({
    method: 'put',
    path: '/people/:personId',
    summary: 'Change name, address, roles, or whether the person may sign in',
    allowed: ['administrator'],
    params,
    body: PersonChange,
    answer: Person,
  }),
};
