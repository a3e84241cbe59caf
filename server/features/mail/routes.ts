import type { Deps } from '../../app';
import type { Handlers } from '../../http/handlers';
import { notFound } from '../../errors';
import { listMessages, readMessage } from '../../mail/messages';
import { resendMessage } from './service';

export const mailHandlers = (deps: Deps): Pick<Handlers, 'listMail' | 'readMail' | 'resendMail'> => ({
  listMail: async () => ({
    transport: deps.config.mail.smtpUrl === null ? 'kept' : 'smtp',
    messages: await listMessages(deps.db, deps.config),
  }),
  async readMail({ params }) {
    const message = await readMessage(deps.db, params.messageId, deps.config);
    if (message === null) throw notFound('This message');
    return message;
  },
  resendMail: ({ params, actor }) => resendMessage(deps, params.messageId, actor.id),
});
