import { randomUUID } from 'node:crypto';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import type { FullMessage, Message } from '#contracts/mail';
import { enqueueMail } from '#server/mail/outbox';
import type { OutgoingMail } from '#server/mail/outbox';
import { smtpTransport } from '#server/mail/transport';
import { mostAttempts, pauseAfter, startMailWorker } from '#server/mail/worker';
import type { MailWorker } from '#server/mail/worker';
import { startTestServer, testConfig } from '../support/server';
import type { TestServer } from '../support/server';
import { startMailSink } from '../support/smtp';
import type { MailSink } from '../support/smtp';

let server: TestServer;
let recipientId: string;
let workers: MailWorker[];
let closing: (() => Promise<void>)[];
beforeEach(async () => {
  workers = [];
  closing = [];
  server = await startTestServer();
  recipientId = await server.addPerson({ name: 'Noor Haddad', email: 'noor@fennmark.example' });
});
afterEach(async () => {
  for (const worker of workers) await worker.stop();
  for (const close of closing) await close();
  await server.close();
});

const mail = (more: Partial<OutgoingMail> = {}): OutgoingMail => ({
  eventId: randomUUID(),
  recipientId,
  subject: 'FN-014 B waits for your review',
  paragraphs: ['Ida Brandt has submitted revision B of FN-014.', 'You are asked to review it.'],
  action: { label: 'Open revision B', href: '/designs/d1/B' },
  threadId: 'design-d1',
  at: new Date().toISOString(),
  ...more,
});
const enqueue = (...messages: OutgoingMail[]) => server.db.transaction((trx) => enqueueMail(trx, messages));
const rows = () => server.db('mail_messages').orderBy('created_at').select('*');

interface WorkerOptions {
  url: string | null;
  now?: () => Date;
  leaseMs?: number;
}
function work({ url, now = () => new Date(), leaseMs = 60_000 }: WorkerOptions): MailWorker {
  const { db, log } = server.deps;
  const transport = url === null ? null : smtpTransport(url, testConfig);
  const worker = startMailWorker({ db, log, now, transport }, { pollMs: 20, leaseMs });
  workers.push(worker);
  return worker;
}
async function until(holds: () => Promise<boolean>): Promise<void> {
  const deadline = Date.now() + 10_000;
  while (!(await holds())) {
    if (Date.now() > deadline) throw new Error(`It did not happen in time: ${JSON.stringify(await rows())}`);
    await new Promise((resolve) => setTimeout(resolve, 10));
  }
}
const allIn = (state: Message['state']) =>
  until(async () => (await rows()).every((row: { state: string }) => row.state === state));
async function sink(): Promise<MailSink> {
  const started = await startMailSink();
  closing.push(() => started.close());
  return started;
}
/** A mail server that refuses recipients as told. */
async function refusing(code: number): Promise<string> {
  const refuser = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onRcptTo: (_address, _session, done) => done(Object.assign(new Error('Not taken'), { responseCode: code })),
  });
  await new Promise<void>((resolve) => refuser.listen(0, '127.0.0.1', resolve));
  closing.push(() => new Promise((resolve) => refuser.close(() => resolve())));
  return `smtp://127.0.0.1:${(refuser.server.address() as AddressInfo).port}`;
}

describe('the outbox', () => {
  test('belongs to the transaction of the step', async () => {
    await expect(
      server.db.transaction(async (trx) => {
        await enqueueMail(trx, [mail()]);
        throw new Error('the step failed');
      }),
    ).rejects.toThrow('the step failed');
    expect(await rows()).toEqual([]);
  });

  test('takes one message for each event and recipient', async () => {
    const message = mail();
    await enqueue(message, message);
    await enqueue({ ...message, subject: 'Again' });
    expect((await rows()).map(({ subject }: { subject: string }) => subject)).toEqual([message.subject]);
  });

  test('takes none for somebody who may not sign in', async () => {
    const gone = await server.addPerson({ active: false });
    await enqueue(mail({ recipientId: gone }));
    expect(await rows()).toEqual([]);
  });
});

describe('through a mail server', () => {
  test('a message arrives once, with text, HTML, one thread and an automatic sender', async () => {
    const { url, until: received } = await sink();
    work({ url });
    const message = mail();
    await enqueue(message);
    const [arrived] = await received((messages) => messages.length > 0);
    expect(arrived?.from?.text).toBe('"Tremolode" <tremolode@fennmark.example>');
    expect(arrived?.to).toMatchObject({ text: '"Noor Haddad" <noor@fennmark.example>' });
    expect(arrived?.subject).toBe(message.subject);
    expect(arrived?.messageId).toBe(`<${message.eventId}.${recipientId}@fennmark.example>`);
    expect(arrived?.references).toBe('<thread.design-d1@fennmark.example>');
    expect(arrived?.inReplyTo).toBe('<thread.design-d1@fennmark.example>');
    expect(arrived?.headers.get('auto-submitted')).toBe('auto-generated');
    expect(arrived?.text).toContain('Noor Haddad,\n\nIda Brandt has submitted revision B of FN-014.');
    expect(arrived?.text).toContain('Open revision B: http://127.0.0.1:4480/designs/d1/B');
    expect(arrived?.html).toContain('<a href="http://127.0.0.1:4480/designs/d1/B">Open revision B</a>');
    await allIn('sent');
    const [row] = await rows();
    expect(row).toMatchObject({ attempts: 1, last_error: null, lease_until: null });
    expect(row.sent_at).not.toBeNull();
  });

  test('what people typed cannot become a header, another recipient, or markup', async () => {
    const { url, until: received } = await sink();
    await server
      .db('people')
      .where({ id: recipientId })
      .update({ name: 'Noor\r\nBcc: spy@elsewhere.example, "Ø" <x@y.example>' });
    work({ url });
    await enqueue(
      mail({
        subject: 'FN-014\r\nBcc: spy@elsewhere.example\r\n\r\n<b>body</b>',
        paragraphs: ['<script>alert("x")</script> & more'],
        action: { label: '<i>Open</i>', href: '/designs/"><script>' },
        threadId: 'design\r\nBcc: spy@elsewhere.example',
        eventId: 'event>\r\nBcc: spy@elsewhere.example',
      }),
    );
    const [arrived] = await received((messages) => messages.length > 0);
    expect(arrived?.headers.has('bcc')).toBe(false);
    expect(arrived?.subject).toBe('FN-014 Bcc: spy@elsewhere.example <b>body</b>');
    const to = arrived?.to;
    expect(Array.isArray(to) ? to : to?.value.map(({ address }) => address)).toEqual(['noor@fennmark.example']);
    expect(arrived?.messageId).toMatch(/^<event-+Bcc--spy-elsewhere.example\.[\w-]+@fennmark\.example>$/);
    expect(arrived?.html).toContain('&lt;script&gt;alert(&quot;x&quot;)&lt;/script&gt; &amp; more');
    expect(arrived?.html).not.toMatch(/<script|<i>/);
  });

  test('names and words beyond ASCII arrive as written', async () => {
    const { url, until: received } = await sink();
    await server.db('people').where({ id: recipientId }).update({ name: 'Łukasz Żółć – 測試' });
    work({ url });
    await enqueue(mail({ subject: 'Größe Ø2 mm, 50 Ω, f₀ = 49.9 Hz — bitte prüfen', paragraphs: ['Ω μ √ 測試 🧲'] }));
    const [arrived] = await received((messages) => messages.length > 0);
    expect(arrived?.to).toMatchObject({ text: '"Łukasz Żółć – 測試" <noor@fennmark.example>' });
    expect(arrived?.subject).toBe('Größe Ø2 mm, 50 Ω, f₀ = 49.9 Hz — bitte prüfen');
    expect(arrived?.text).toContain('Ω μ √ 測試 🧲');
  });

  test('a hundred messages to two workers arrive once each', async () => {
    const { url, messages, until: received } = await sink();
    work({ url });
    work({ url });
    await enqueue(...Array.from({ length: 100 }, () => mail()));
    await received((arrived) => arrived.length >= 100);
    await allIn('sent');
    expect(messages).toHaveLength(100);
    expect(new Set(messages.map(({ messageId }) => messageId)).size).toBe(100);
  });
});

describe('when the server was killed in the middle', () => {
  const now = new Date('2027-03-01T08:00:00.000Z');
  const left = (minutes: number) => ({
    state: 'sending',
    attempts: 1,
    lease_until: new Date(now.getTime() + minutes * 60_000).toISOString(),
  });

  test('a message taken before is sent again under the same Message-ID once its lease is over', async () => {
    const { url, messages, until: received } = await sink();
    const message = mail();
    await enqueue(message);
    await server.db('mail_messages').update(left(1));
    let time = now;
    work({ url, now: () => time });
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(messages).toHaveLength(0);
    time = new Date(now.getTime() + 60_001);
    const [arrived] = await received((all) => all.length > 0);
    expect(arrived?.messageId).toBe(`<${message.eventId}.${recipientId}@fennmark.example>`);
    await allIn('sent');
    expect(messages).toHaveLength(1);
  });

  test('one that has taken the server down each time is given up', async () => {
    const { url, messages } = await sink();
    await enqueue(mail());
    await server.db('mail_messages').update({ ...left(-1), attempts: mostAttempts });
    work({ url, now: () => now });
    await allIn('failed');
    expect(messages).toHaveLength(0);
    expect((await rows())[0].last_error).toBe('Broken off too often.');
  });
});

describe('when the mail server does not take it', () => {
  test('for now, it is tried again after growing pauses and then given up', async () => {
    const url = await refusing(451);
    let time = new Date('2027-03-01T08:00:00.000Z');
    const start = time.getTime();
    await enqueue(mail({ at: time.toISOString() }));
    work({ url, now: () => time });
    for (let attempt = 1; attempt < mostAttempts; attempt += 1) {
      await until(async () => (await rows())[0].state === 'waiting' && (await rows())[0].attempts === attempt);
      const [row] = await rows();
      expect(row.last_error).toContain('451');
      expect(new Date(row.due_at).getTime() - time.getTime()).toBe(pauseAfter(attempt));
      time = new Date(row.due_at);
    }
    await allIn('failed');
    expect((await rows())[0].attempts).toBe(mostAttempts);
    expect((time.getTime() - start) / 3_600_000).toBeGreaterThan(12);
  });

  test('for good, it is given up at once', async () => {
    const url = await refusing(550);
    await enqueue(mail());
    work({ url });
    await allIn('failed');
    expect((await rows())[0]).toMatchObject({ attempts: 1 });
    expect((await rows())[0].last_error).toContain('550');
  });

  test('because it is not there, it waits and the server goes on', async () => {
    const gone = await startMailSink();
    await gone.close();
    await enqueue(mail());
    work({ url: gone.url });
    await until(async () => (await rows())[0].attempts === 1 && (await rows())[0].state === 'waiting');
    expect((await rows())[0].last_error).toContain('ECONNREFUSED');
  });
});

describe('the worker', () => {
  test('keeps a message for itself as long as a slow mail server takes', async () => {
    let arrived = 0;
    const slow = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onData(stream, _session, done) {
        arrived += 1;
        stream.resume().on('end', () => setTimeout(done, 600));
      },
    });
    await new Promise<void>((resolve) => slow.listen(0, '127.0.0.1', resolve));
    closing.push(() => new Promise((resolve) => slow.close(() => resolve())));
    const url = `smtp://127.0.0.1:${(slow.server.address() as AddressInfo).port}`;
    work({ url, leaseMs: 150 });
    work({ url, leaseMs: 150 });
    await enqueue(mail());
    await allIn('sent');
    expect(arrived).toBe(1);
  });

  test('outlives a database that fails for a moment', async () => {
    const { url, until: received } = await sink();
    await server.db.schema.renameTable('mail_messages', 'mail_away');
    work({ url });
    await new Promise((resolve) => setTimeout(resolve, 100));
    await server.db.schema.renameTable('mail_away', 'mail_messages');
    await enqueue(mail());
    await received((messages) => messages.length === 1);
  });
});

describe('under Administration', () => {
  const list = async () => {
    const administrator = await server.as('administrator');
    const { body } = await administrator.get('/api/mail');
    return { administrator, ...(body as { transport: string; messages: Message[] }) };
  };

  test('without a mail server, messages are kept and can be read', async () => {
    work({ url: null });
    const message = mail();
    await enqueue(message);
    await allIn('kept');
    const { administrator, transport, messages } = await list();
    expect(transport).toBe('kept');
    expect(messages).toHaveLength(1);
    expect(messages[0]).toMatchObject({
      to: 'Noor Haddad <noor@fennmark.example>',
      subject: message.subject,
      state: 'kept',
      sentAt: null,
    });
    const { body } = await administrator.get(`/api/mail/${messages[0]?.id}`);
    const full = body as FullMessage;
    expect(full.text).toContain('Open revision B: http://127.0.0.1:4480/designs/d1/B');
    expect(full.html).toContain('Ida Brandt has submitted');
    const resent = await administrator.post(`/api/mail/${messages[0]?.id}/resend`);
    expect([resent.status, resent.body.error.code]).toEqual([409, 'conflict']);
  });

  test('a message that failed is sent again, to the address of today', async () => {
    const url = await refusing(550);
    const failing = work({ url });
    await enqueue(mail());
    await allIn('failed');
    await failing.stop();
    await server.db('people').where({ id: recipientId }).update({ email: 'noor.haddad@fennmark.example' });
    const { administrator, messages } = await list();
    const good = await sink();
    const { status, body } = await administrator.post(`/api/mail/${messages[0]?.id}/resend`);
    expect(status).toBe(200);
    expect(body).toMatchObject({ state: 'waiting', attempts: 0, lastError: null });
    work({ url: good.url });
    const [arrived] = await good.until((all) => all.length > 0);
    expect(arrived?.to).toMatchObject({ text: '"Noor Haddad" <noor.haddad@fennmark.example>' });
    await allIn('sent');
    const again = await administrator.post(`/api/mail/${messages[0]?.id}/resend`);
    expect([again.status, again.body.error.message]).toEqual([409, 'This message has been sent already.']);
    const [entry] = await server.db('audit_entries').where({ action: 'resent' });
    expect(entry.subject_id).toBe(messages[0]?.id);
  });

  test('one that is not there is 404', async () => {
    const { administrator } = await list();
    const id = randomUUID();
    expect((await administrator.get(`/api/mail/${id}`)).status).toBe(404);
    expect((await administrator.post(`/api/mail/${id}/resend`)).status).toBe(404);
  });
});
