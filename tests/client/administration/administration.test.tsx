import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { FullMessage } from '#contracts/mail';
import { Person } from '#contracts/people';
import { AuditTable } from '../../../src/features/administration/audit-table';
import { AuditVerification } from '../../../src/features/administration/audit-verification';
import { MessageDialog } from '../../../src/features/administration/message-dialog';
import { PeopleTable } from '../../../src/features/people/people-table';
import { forgetCsrfToken } from '../../../src/lib/fetch-json';
import { clientApi } from '../../support/client-api';
import { drawn } from '../../support/client-drawn';
import { digest, idOf, people } from '../../support/client-samples';

const at = '2026-03-14T09:32:00.000Z';
const message = FullMessage.parse({
  id: idOf(60),
  messageId: '<a@b.example>',
  to: 'Ilse Varga <ilse@fennmark.example>',
  subject: 'FN-014 B approved',
  state: 'failed',
  attempts: 5,
  lastError: 'Mailbox full',
  createdAt: at,
  sentAt: null,
  text: 'Plain words.',
  html: '<p>Words</p><script>document.title = "no"</script>',
});
const ilse = Person.parse({
  ...people.designer,
  email: 'ilse@fennmark.example',
  roles: ['designer'],
  active: true,
  version: 3,
  createdAt: at,
  lastSignInAt: null,
});

beforeEach(() => forgetCsrfToken());

describe('a message', () => {
  it('is read as text and, in a frame that may run nothing, as HTML; a failed one is sent again', async () => {
    const api = clientApi({
      readMail: () => ({ body: message }),
      resendMail: () => ({ body: { ...message, state: 'waiting' } }),
    });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<MessageDialog messageId={message.id} onClose={() => undefined} />);
    expect(await screen.findByText('Plain words.')).toBeTruthy();
    expect(screen.getByText('Mailbox full')).toBeTruthy();
    await userEvent.click(screen.getByRole('tab', { name: 'HTML' }));
    const frame = screen.getByTitle('HTML of “FN-014 B approved”');
    expect(frame.getAttribute('sandbox')).toBe('');
    await userEvent.click(screen.getByRole('button', { name: 'Send it again' }));
    await waitFor(() => expect(api.asked.some(({ name }) => name === 'resendMail')).toBe(true));
  });

  it('that was sent says why it is not sent again', async () => {
    vi.stubGlobal(
      'fetch',
      clientApi({ readMail: () => ({ body: { ...message, state: 'sent', lastError: null, sentAt: at } }) }).fetch,
    );
    drawn(<MessageDialog messageId={message.id} onClose={() => undefined} />);
    expect((await screen.findByRole('button', { name: 'Send it again' })).getAttribute('aria-disabled')).toBe('true');
  });
});

describe('the audit trail', () => {
  it('tells a broken chain, where and what', async () => {
    const broken = {
      intact: false,
      entries: 12,
      firstFault: { sequence: 7, what: 'The hash does not fit the entry.' },
      lastHash: digest,
    };
    vi.stubGlobal('fetch', clientApi({ verifyAudit: () => ({ body: broken }) }).fetch);
    drawn(<AuditVerification />);
    expect(await screen.findByText('The chain is broken')).toBeTruthy();
    expect(screen.getByRole('status').textContent).toContain(
      'First fault at entry 7: The hash does not fit the entry.',
    );
  });

  it('fetches earlier entries from the last one shown', async () => {
    const entry = (sequence: number) => ({
      sequence,
      at,
      by: people.designer,
      action: 'saved',
      subject: 'brief',
      subjectId: idOf(sequence),
      detail: { name: `BR-${sequence}` },
      hash: digest,
    });
    const api = clientApi({
      listAudit: () => ({ body: { entries: Array.from({ length: 100 }, (_, n) => entry(150 - n)) } }),
    });
    vi.stubGlobal('fetch', (url: string, init: RequestInit) => {
      if (String(url).includes('before=51')) return Promise.resolve(Response.json({ entries: [entry(50)] }));
      return api.fetch(url, init);
    });
    drawn(<AuditTable />);
    await userEvent.click(await screen.findByRole('button', { name: 'Fetch earlier entries' }));
    expect(await screen.findByText('brief BR-50')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Fetch earlier entries' })).toBeNull();
  });
});

describe('people', () => {
  it('are deactivated with the version that was seen', async () => {
    const api = clientApi({ changePerson: () => ({ body: { ...ilse, active: false, version: 4 } }) });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<PeopleTable people={[ilse]} meId={idOf(99)} />);
    await userEvent.click(screen.getByRole('button', { name: 'Change Ilse Varga' }));
    const dialog = within(screen.getByRole('alertdialog'));
    await userEvent.click(dialog.getByRole('checkbox', { name: /May sign in/ }));
    await userEvent.click(dialog.getByRole('button', { name: 'Save' }));
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(api.bodies('changePerson')).toEqual([
      { version: 3, name: 'Ilse Varga', email: 'ilse@fennmark.example', roles: ['designer'], active: false },
    ]);
  });

  it('are added with a first password of sufficient length', async () => {
    const api = clientApi({
      createPerson: () => ({
        code: 'invalid',
        message: 'Taken.',
        issues: [{ path: 'email', message: 'Somebody has this address already.' }],
      }),
    });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<PeopleTable people={[ilse]} meId={idOf(99)} />);
    await userEvent.click(screen.getByRole('button', { name: 'Add a person' }));
    const dialog = within(screen.getByRole('alertdialog'));
    await userEvent.type(dialog.getByRole('textbox', { name: /Name/ }), 'Noor Haddad');
    await userEvent.type(dialog.getByRole('textbox', { name: /E-mail/ }), 'ilse@fennmark.example');
    await userEvent.type(dialog.getByLabelText(/First password/), 'short');
    await userEvent.click(dialog.getByRole('button', { name: 'Add the person' }));
    expect(await dialog.findByText('At least 12 characters.')).toBeTruthy();
    expect(api.bodies('createPerson')).toEqual([]);
    await userEvent.type(dialog.getByLabelText(/First password/), ' and longer now');
    await userEvent.click(dialog.getByRole('button', { name: 'Add the person' }));
    expect(await dialog.findByText('Somebody has this address already.')).toBeTruthy();
    expect(dialog.getByRole<HTMLInputElement>('textbox', { name: /Name/ }).value).toBe('Noor Haddad');
  });
});
