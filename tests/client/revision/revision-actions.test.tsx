import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { Revision } from '#contracts/revisions';
import { RevisionActions } from '../../../src/features/revision/revision-actions';
import { revisionQuery } from '../../../src/features/revision/queries';
import { forgetCsrfToken } from '../../../src/lib/fetch-json';
import { clientApi } from '../../support/client-api';
import { drawn } from '../../support/client-drawn';
import { digest, revision } from '../../support/client-samples';
import { useQuery } from '@tanstack/react-query';

/** As on the page: what is drawn follows the query. */
function Page({ initial }: { initial: Revision }) {
  const { data } = useQuery({ ...revisionQuery(initial.id), initialData: initial, staleTime: Infinity });
  return <RevisionActions revision={data} />;
}

const button = (name: string | RegExp) => screen.getByRole('button', { name });

describe('the steps of a revision', () => {
  beforeEach(() => forgetCsrfToken());

  it('samples are valid answers', () => {
    expect(Revision.safeParse(revision).error).toBeUndefined();
  });

  it('shows the first possible onward step as the primary action, and says of the others why not', async () => {
    vi.stubGlobal('fetch', clientApi({}).fetch);
    drawn(<Page initial={revision} />);
    expect(button('Approve').getAttribute('aria-disabled')).toBeNull();
    expect(button('Request changes')).toBeTruthy();
    await userEvent.click(button('More'));
    const abandon = await screen.findByRole('menuitem', { name: /Abandon/ });
    expect(abandon.getAttribute('aria-disabled')).toBe('true');
    expect(abandon.textContent).toContain('This needs the role designer or release authority.');
  });

  it('keeps an impossible primary action visible with the server’s words', () => {
    drawn(
      <Page
        initial={{
          ...revision,
          availableEvents: ['remark'],
          whyNot: { approve: 'You wrote or edited this revision; somebody else has to decide on it.' },
        }}
      />,
    );
    const approve = button('Approve');
    expect(approve.getAttribute('aria-disabled')).toBe('true');
    const reason = document.getElementById(approve.getAttribute('aria-describedby') ?? '');
    expect(reason?.textContent).toContain('You wrote or edited this revision');
  });

  it('offers nothing that the server did not mention, even where the chart knows it', () => {
    drawn(<Page initial={{ ...revision, availableEvents: ['remark'], whyNot: {} }} />);
    expect(screen.queryByRole('button', { name: 'Approve' })).toBeNull();
    expect(button('Add a remark')).toBeTruthy();
  });

  it('signs what is shown: version, digest and password are sent as they stood', async () => {
    const api = clientApi({
      sendEvent: () => ({ body: { ...revision, state: 'clearedForBench', availableEvents: [], whyNot: {} } }),
    });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<Page initial={revision} />);
    await userEvent.click(button('Approve'));
    const dialog = screen.getByRole('alertdialog');
    expect(dialog.textContent).toContain('I have reviewed this revision and approve it for the bench.');
    expect(dialog.textContent?.replace(/\s/g, '')).toContain(digest);
    await userEvent.type(within(dialog).getByLabelText(/Your password/), 'correct horse');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Sign the approval' }));
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(api.bodies('sendEvent')).toEqual([
      { type: 'approve', version: 4, password: 'correct horse', signedDigest: digest },
    ]);
  });

  it('sends the version that the page has after what was pending is saved', async () => {
    const draft: Revision = { ...revision, state: 'draft', availableEvents: ['submit', 'abandon'], whyNot: {} };
    const api = clientApi({ sendEvent: () => ({ body: { ...revision, version: 10 } }) });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<RevisionActions revision={draft} beforeSend={() => Promise.resolve({ ...draft, version: 9 })} />);
    await userEvent.click(button('Submit for review'));
    await userEvent.click(within(screen.getByRole('alertdialog')).getByRole('button', { name: 'Submit for review' }));
    await waitFor(() => expect(api.bodies('sendEvent')).toEqual([{ type: 'submit', version: 9 }]));
  });

  it('asks for a reason before anything is sent', async () => {
    const api = clientApi({});
    vi.stubGlobal('fetch', api.fetch);
    drawn(<Page initial={revision} />);
    await userEvent.click(button('Request changes'));
    const dialog = screen.getByRole('alertdialog');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Request changes' }));
    const reason = within(dialog).getByLabelText(/What has to change/);
    await waitFor(() => expect(reason.getAttribute('aria-invalid')).toBe('true'));
    expect(document.activeElement).toBe(reason);
    expect(api.bodies('sendEvent')).toEqual([]);
  });

  it('puts a wrong password at its field and keeps the rest', async () => {
    const api = clientApi({
      sendEvent: () => ({
        code: 'invalid',
        message: 'This is not your password.',
        issues: [{ path: 'password', message: 'This is not your password.' }],
      }),
    });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<Page initial={revision} />);
    await userEvent.click(button('Approve'));
    const dialog = screen.getByRole('alertdialog');
    await userEvent.type(within(dialog).getByLabelText(/Note to the approval/), 'Travel checked by hand.');
    await userEvent.type(within(dialog).getByLabelText(/Your password/), 'wrong');
    await userEvent.click(within(dialog).getByRole('button', { name: 'Sign the approval' }));
    const password = within(dialog).getByLabelText(/Your password/);
    await waitFor(() => expect(password.getAttribute('aria-invalid')).toBe('true'));
    expect(within(dialog).getByText('This is not your password.')).toBeTruthy();
    expect(within(dialog).getByLabelText<HTMLTextAreaElement>(/Note to the approval/).value).toBe(
      'Travel checked by hand.',
    );
  });

  it('tells what changed on a stale page, keeps the text, and goes on from the current state', async () => {
    const newer: Revision = { ...revision, version: 5, digest: 'b2'.repeat(32) };
    let stale = true;
    const api = clientApi({
      readRevision: () => ({ body: newer }),
      sendEvent: () =>
        stale
          ? {
              code: 'conflict',
              message: 'This revision changed.',
              changed: [{ version: 5, by: 'Bram Okafor', at: '2026-03-14T09:40:00.000Z', what: 'A remark was added' }],
            }
          : { body: { ...newer, version: 6 } },
    });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<Page initial={revision} />);
    await userEvent.click(button('Request changes'));
    const dialog = screen.getByRole('alertdialog');
    await userEvent.type(within(dialog).getByLabelText(/What has to change/), 'The stop is too near.');
    const send = within(dialog).getByRole<HTMLButtonElement>('button', { name: 'Request changes' });
    await userEvent.click(send);
    expect(await within(dialog).findByText(/A remark was added/)).toBeTruthy();
    expect(within(dialog).getByText(/Bram Okafor/)).toBeTruthy();
    expect(send.disabled).toBe(true);
    stale = false;
    await userEvent.click(within(dialog).getByRole('button', { name: 'Load the current state' }));
    await waitFor(() => expect(send.disabled).toBe(false));
    expect(within(dialog).getByLabelText<HTMLTextAreaElement>(/What has to change/).value).toBe(
      'The stop is too near.',
    );
    await userEvent.click(send);
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(api.bodies('sendEvent').at(-1)).toEqual({
      type: 'requestChanges',
      version: 5,
      reason: 'The stop is too near.',
    });
  });
});
