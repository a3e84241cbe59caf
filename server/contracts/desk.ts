import { z } from 'zod';
import { Time } from './basics';
import { Activity } from './revisions';
import { route } from './route';

export const DeskItem = z.strictObject({
  /** Where it is answered, a path of the client. */
  href: z.string(),
  /** What it is about, e.g. “FN-014 B · Pump-side node, 49 Hz”. */
  title: z.string(),
  /** What is asked, or what is being waited for, and why it is mine. */
  what: z.string(),
  since: Time,
});
export type DeskItem = z.infer<typeof DeskItem>;

export const Desk = z.strictObject({
  waitsForMe: z.array(DeskItem),
  iWaitFor: z.array(DeskItem),
  recent: z.array(z.strictObject({ ...Activity.shape, href: z.string(), title: z.string() })),
});
export type Desk = z.infer<typeof Desk>;

export const deskRoutes = {
  readDesk: route({
    method: 'get',
    path: '/desk',
    summary: 'What waits for me, what I wait for',
    allowed: 'signedIn',
    answer: Desk,
  }),
};
