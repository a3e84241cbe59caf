import type { AddressInfo } from 'node:net';
import { simpleParser } from 'mailparser';
import type { ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export interface MailSink {
  url: string;
  /** Everything received so far, in order. */
  messages: ParsedMail[];
  /** Resolves when the condition holds for what has been received. */
  until(condition: (messages: ParsedMail[]) => boolean, timeoutMs?: number): Promise<ParsedMail[]>;
  close(): Promise<void>;
}

/** A real SMTP server on loopback that keeps what it receives. */
export async function startMailSink(): Promise<MailSink> {
  const messages: ParsedMail[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, _session, done) {
      simpleParser(stream).then(
        (mail) => {
          messages.push(mail);
          done();
        },
        (error: Error) => done(error),
      );
    },
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${port}`,
    messages,
    async until(condition, timeoutMs = 15_000) {
      const deadline = Date.now() + timeoutMs;
      while (!condition(messages)) {
        if (Date.now() > deadline) {
          throw new Error(`Mail did not arrive in time; got: ${messages.map(({ subject }) => subject).join(' | ')}`);
        }
        await new Promise((resolve) => setTimeout(resolve, 50));
      }
      return messages;
    },
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
