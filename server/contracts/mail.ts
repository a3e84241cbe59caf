import { z } from 'zod';
import { Id, Time } from './basics';
import { route } from './route';

export const Message = z.strictObject({
  id: Id,
  messageId: z.string(),
  to: z.string(),
  subject: z.string(),
  state: z.enum(['waiting', 'sending', 'sent', 'kept', 'failed']),
  attempts: z.number().int(),
  lastError: z.string().nullable(),
  createdAt: Time,
  sentAt: Time.nullable(),
});
export type Message = z.infer<typeof Message>;
export const FullMessage = z.strictObject({ ...Message.shape, text: z.string(), html: z.string() });
export type FullMessage = z.infer<typeof FullMessage>;

const params = z.strictObject({ messageId: Id });
export const mailRoutes = {
  listMail: route({
    method: 'get',
    path: '/mail',
    summary: 'Messages sent, waiting and kept here',
    allowed: ['administrator'],
    answer: z.strictObject({ transport: z.enum(['smtp', 'kept']), messages: z.array(Message) }),
  }),
  readMail: route({
    method: 'get',
    path: '/mail/:messageId',
    summary: 'One message',
    allowed: ['administrator'],
    params,
    answer: FullMessage,
  }),
  resendMail: route({
    method: 'post',
    path: '/mail/:messageId/resend',
    summary: 'Try a failed message again',
    allowed: ['administrator'],
    params,
    answer: FullMessage,
  }),
};
