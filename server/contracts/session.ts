import { z } from 'zod';
import { Role } from '#workflows/revision';
import { Id } from './basics';
import { route } from './route';

/** Sections of the left rail, each only for those who may enter. */
export const Section = z.enum(['desk', 'briefs', 'designs', 'bench', 'catalogue', 'records', 'administration']);
export type Section = z.infer<typeof Section>;

export const Me = z.strictObject({
  id: Id,
  name: z.string(),
  email: z.string(),
  roles: z.array(Role),
  mayEnter: z.array(Section),
});
export type Me = z.infer<typeof Me>;

export const SessionAnswer = z.strictObject({ me: Me.nullable(), csrfToken: z.string() });
export type SessionAnswer = z.infer<typeof SessionAnswer>;

export const SignIn = z.strictObject({
  email: z.string().trim().min(1, 'Give your e-mail address.').max(254),
  password: z.string().min(1, 'Give your password.').max(1000),
});
export type SignIn = z.infer<typeof SignIn>;

export const passwordLength = { least: 12, most: 200 };
export const NewPassword = z
  .string()
  .min(passwordLength.least, `At least ${passwordLength.least} characters.`)
  .max(passwordLength.most, `At most ${passwordLength.most} characters.`);

export const PasswordChange = z.strictObject({
  currentPassword: z.string().min(1, 'Give your current password.').max(1000),
  newPassword: NewPassword,
});
export type PasswordChange = z.infer<typeof PasswordChange>;

export const sessionRoutes = {
  readSession: route({
    method: 'get',
    path: '/session',
    summary: 'Who is signed in, and the token that changes need',
    allowed: 'anyone',
    answer: SessionAnswer,
  }),
  signIn: route({
    method: 'post',
    path: '/session',
    summary: 'Sign in',
    allowed: 'anyone',
    body: SignIn,
    answer: SessionAnswer,
  }),
  signOut: route({
    method: 'delete',
    path: '/session',
    summary: 'Sign out here',
    allowed: 'signedIn',
    answer: SessionAnswer,
  }),
  signOutEverywhere: route({
    method: 'delete',
    path: '/sessions',
    summary: 'Sign out on every device',
    allowed: 'signedIn',
    answer: SessionAnswer,
  }),
  changePassword: route({
    method: 'put',
    path: '/me/password',
    summary: 'Change the own password; ends the other sessions',
    allowed: 'signedIn',
    body: PasswordChange,
    status: 204,
  }),
};
