import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';
import { RequestError } from '../../../src/lib/request-error';
import { Button } from '../../../src/ui/button';
import { ConfirmDialog } from '../../../src/ui/confirm-dialog';

function Release({ onConfirm }: { onConfirm: (given: { reason: string; password: string }) => Promise<unknown> }) {
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button onPress={() => setOpen(true)}>Release</Button>
      <ConfirmDialog
        title="Sign and release"
        isOpen={open}
        onClose={() => setOpen(false)}
        confirmLabel="Sign"
        reason={{ label: 'Reason', required: true }}
        password
        meaning="I release this revision."
        paths={{ reason: 'statement' }}
        onConfirm={onConfirm}
      />
    </>
  );
}

const open = async () => userEvent.click(screen.getByRole('button', { name: 'Release' }));
const reason = () => screen.getByRole<HTMLTextAreaElement>('textbox', { name: /Reason/ });
const password = () => screen.getByLabelText<HTMLInputElement>('Your password');

describe('ConfirmDialog', () => {
  it('takes the focus, says what is signed, closes on Escape and gives the focus back', async () => {
    render(<Release onConfirm={() => Promise.resolve()} />);
    await open();
    expect(screen.getByRole('alertdialog', { name: 'Sign and release' })).toBeTruthy();
    expect(screen.getByText('I release this revision.')).toBeTruthy();
    await waitFor(() => expect(document.activeElement).toBe(reason()));
    await userEvent.keyboard('{Escape}');
    expect(screen.queryByRole('alertdialog')).toBeNull();
    await waitFor(() => expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Release' })));
  });

  it('asks for what is missing at its field, and sends nothing before', async () => {
    const confirm = vi.fn(() => Promise.resolve());
    render(<Release onConfirm={confirm} />);
    await open();
    await userEvent.click(screen.getByRole('button', { name: 'Sign' }));
    expect(screen.getByText('Reason: say it in words.')).toBeTruthy();
    expect(screen.getByText('Give your password: it signs this.')).toBeTruthy();
    expect(confirm).not.toHaveBeenCalled();
  });

  it('hands on what was given and closes', async () => {
    const confirm = vi.fn(() => Promise.resolve());
    render(<Release onConfirm={confirm} />);
    await open();
    await userEvent.type(reason(), ' All evidence is in. ');
    await userEvent.type(password(), 'correct horse{Enter}');
    expect(confirm).toHaveBeenCalledWith({ reason: 'All evidence is in.', password: 'correct horse' });
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
  });

  it('keeps what was typed and puts the server’s issues at their fields', async () => {
    const refusal = new RequestError(422, 'invalid', 'Not signed.', {
      issues: [
        { path: 'password', message: 'This is not your password.' },
        { path: 'statement', message: 'Name the evidence.' },
        { path: 'version', message: 'Stale.' },
      ],
    });
    render(<Release onConfirm={() => Promise.reject(refusal)} />);
    await open();
    await userEvent.type(reason(), 'Because');
    await userEvent.type(password(), 'wrong');
    await userEvent.click(screen.getByRole('button', { name: 'Sign' }));
    expect(await screen.findByText('This is not your password.')).toBeTruthy();
    expect(screen.getByText('Name the evidence.')).toBeTruthy();
    expect(screen.getByRole('alert').textContent).toContain('Stale');
    expect(reason().value).toBe('Because');
    expect(document.activeElement).toBe(password());
  });
});
