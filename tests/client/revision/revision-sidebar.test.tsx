import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import type { Remark, Revision } from '#contracts/revisions';
import { RevisionHistory, RevisionRemarks, RevisionSignatures } from '../../../src/features/revision/revision-sidebar';
import { forgetCsrfToken } from '../../../src/lib/fetch-json';
import { clientApi } from '../../support/client-api';
import { drawn } from '../../support/client-drawn';
import { digest, idOf, people, revision } from '../../support/client-samples';

const at = '2026-03-14T09:40:00.000Z';
const open: Remark = {
  id: idOf(70),
  by: people.reviewer,
  at,
  text: 'The stop is too near.',
  blocking: true,
  target: 'magnets.0.length',
  closed: null,
};
const closed: Remark = {
  ...open,
  id: idOf(71),
  text: 'Name the batch.',
  blocking: false,
  target: null,
  closed: { by: people.designer, at, answer: 'Batch 12.' },
};
const withRemarks: Revision = {
  ...revision,
  remarks: [closed, open],
  availableEvents: ['remark', 'closeRemark'],
  whyNot: {},
};

describe('the remarks on a revision', () => {
  beforeEach(() => forgetCsrfToken());

  it('stand open ones first, with their value, and say what blocks', () => {
    drawn(<RevisionRemarks revision={withRemarks} />);
    const items = screen.getAllByRole('listitem').map((item) => item.textContent);
    expect(items[0]).toContain('The stop is too near.');
    expect(items[1]).toContain('Batch 12.');
    expect(screen.getByRole('link', { name: 'Magnets 1, length' }).getAttribute('href')).toBe(
      '#field-magnets.0.length',
    );
    expect(screen.getByText('1 open, 1 blocking')).toBeTruthy();
  });

  it('are closed with an answer where they stand', async () => {
    const api = clientApi({ sendEvent: () => ({ body: { ...withRemarks, version: 5 } }) });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<RevisionRemarks revision={withRemarks} />);
    await userEvent.click(screen.getByRole('button', { name: /Close remark of Bram/ }));
    const dialog = within(screen.getByRole('alertdialog'));
    expect(dialog.getByText('The stop is too near.')).toBeTruthy();
    await userEvent.type(dialog.getByRole('textbox', { name: /Answer/ }), 'Moved outwards.');
    await userEvent.click(dialog.getByRole('button', { name: 'Close remark' }));
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(api.bodies('sendEvent')).toEqual([
      { type: 'closeRemark', version: 4, remarkId: open.id, answer: 'Moved outwards.' },
    ]);
  });

  it('are written about the value from which the dialog was opened', async () => {
    const api = clientApi({ sendEvent: () => ({ body: { ...withRemarks, version: 5 } }) });
    vi.stubGlobal('fetch', api.fetch);
    const done = vi.fn();
    drawn(<RevisionRemarks revision={withRemarks} target="magnets.0.polarity" onTargetDone={done} />);
    const dialog = within(screen.getByRole('alertdialog'));
    expect(dialog.getByRole<HTMLInputElement>('combobox', { name: /About/ }).value).toBe('Magnets 1, polarity');
    await userEvent.type(dialog.getByRole('textbox', { name: /Remark/ }), 'Which way round?');
    await userEvent.click(dialog.getByRole('checkbox'));
    await userEvent.click(dialog.getByRole('button', { name: 'Add a remark' }));
    await waitFor(() => expect(done).toHaveBeenCalled());
    expect(api.bodies('sendEvent')).toEqual([
      { type: 'remark', version: 4, text: 'Which way round?', blocking: true, target: 'magnets.0.polarity' },
    ]);
  });

  it('say why none can be added', () => {
    drawn(
      <RevisionRemarks
        revision={{ ...revision, availableEvents: [], whyNot: { remark: 'This needs the role reviewer.' } }}
      />,
    );
    expect(screen.getByText('This needs the role reviewer.')).toBeTruthy();
  });
});

describe('the signatures and the history', () => {
  it('show name, meaning and digest of what was signed', () => {
    const signature = {
      id: idOf(80),
      by: people.reviewer,
      at,
      event: 'approve' as const,
      meaning: 'I have reviewed this.',
      statement: 'Travel checked.',
      digest,
    };
    drawn(<RevisionSignatures revision={{ ...revision, signatures: [signature] }} />);
    expect(screen.getByText('Bram Okafor')).toBeTruthy();
    expect(screen.getByText('“I have reviewed this.”')).toBeTruthy();
    expect(screen.getByTitle('SHA-256').textContent).toBe(digest);
    expect(screen.getByText('1 of 2 approvals')).toBeTruthy();
  });

  it('tell what happened, newest first, the rest on demand', async () => {
    const activity = Array.from({ length: 10 }, (_, n) => ({
      at: `2026-03-14T09:${10 + n}:00.000Z`,
      by: null,
      sentence: `Step ${n}.`,
    }));
    drawn(<RevisionHistory revision={{ ...revision, activity }} />);
    expect(screen.getAllByRole('listitem')[0]?.textContent).toContain('Step 9.');
    expect(screen.queryByText('Step 0.')).toBeNull();
    await userEvent.click(screen.getByRole('button', { name: /Show 2 earlier entries/ }));
    expect(screen.getByText('Step 0.')).toBeTruthy();
  });
});
