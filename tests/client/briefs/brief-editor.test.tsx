import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { describe, expect, it, vi } from 'vitest';
import { Brief } from '#contracts/briefs';
import { BriefEditor } from '../../../src/features/briefs/brief-editor';
import { RequestError } from '../../../src/lib/request-error';
import { drawn } from '../../support/client-drawn';
import { briefDocument, idOf, people } from '../../support/client-samples';

const at = '2026-03-14T09:32:00.000Z';
const brief: Brief = Brief.parse({
  id: idOf(12),
  number: 'BR-031',
  version: 2,
  document: briefDocument,
  vibrationInWords: '50.0 Hz, 1.00 m/s² peak',
  createdAt: at,
  createdBy: people.designer,
  updatedAt: at,
  updatedBy: people.designer,
  designs: [],
  mayEdit: true,
  whyNotEdit: null,
});

type Save = Parameters<typeof BriefEditor>[0]['save'];

function edit(save: Save, of: Brief | null = brief) {
  const onSaved = vi.fn();
  const result = drawn(
    <BriefEditor brief={of} saveLabel="Save the brief" save={save} onSaved={onSaved} header={(button) => button} />,
  );
  return { ...result, onSaved };
}
const field = (name: RegExp | string) => screen.getByRole<HTMLInputElement>('textbox', { name });
const press = (name: string) => userEvent.click(screen.getByRole('button', { name }));

describe('the editor of a brief', () => {
  it('sends the document with the version it was written on', async () => {
    const save = vi.fn<Save>(() => Promise.resolve(brief));
    const { onSaved } = edit(save);
    await userEvent.clear(field(/Power needed/));
    await userEvent.type(field(/Power needed/), '2 mW');
    await press('Save the brief');
    await waitFor(() => expect(onSaved).toHaveBeenCalledWith(brief));
    expect(save).toHaveBeenCalledWith({ ...briefDocument, powerNeeded: 0.002 }, 2);
  });

  it('puts the server’s issue at its field, with value and limit, and keeps what was typed', async () => {
    const issue = {
      path: 'document.vibration.frequency',
      value: '200 kHz',
      message: 'Frequency is above the limit',
      limit: 100_000,
    };
    edit(() => Promise.reject(new RequestError(422, 'invalid', 'This brief cannot be taken.', { issues: [issue] })));
    await userEvent.clear(field('Frequency'));
    await userEvent.type(field('Frequency'), '50.5 Hz');
    await press('Save the brief');
    await waitFor(() => expect(field('Frequency').getAttribute('aria-invalid')).toBe('true'));
    expect(screen.getByText(/limit 100000/)).toBeTruthy();
    expect(field('Frequency').value).toBe('50.5 Hz');
  });

  it('sends nothing while fields are missing, and goes to the first', async () => {
    const save = vi.fn<Save>();
    edit(save, null);
    await press('Save the brief');
    await waitFor(() => expect(field(/Power needed/).getAttribute('aria-invalid')).toBe('true'));
    expect(save).not.toHaveBeenCalled();
    expect(document.activeElement?.getAttribute('aria-invalid')).toBe('true');
  });

  it('tells of a newer version, keeps the own changes, and takes theirs for the rest', async () => {
    const changed = [{ version: 3, by: 'Bram Okafor', at, what: 'Changed the place.' }];
    const newer: Brief = { ...brief, version: 3, document: { ...briefDocument, place: 'Free end' } };
    const save = vi.fn<Save>((_, version) =>
      version === 2 ? Promise.reject(new RequestError(409, 'conflict', 'Newer.', { changed })) : Promise.resolve(brief),
    );
    const onSaved = vi.fn();
    function Page() {
      const [shown, setShown] = useState(brief);
      return (
        <>
          <button onClick={() => setShown(newer)}>refetch</button>
          <BriefEditor
            brief={shown}
            saveLabel="Save the brief"
            save={save}
            onSaved={onSaved}
            header={(button) => button}
          />
        </>
      );
    }
    drawn(<Page />);
    await userEvent.type(field('Machine'), ' 2');
    await press('Save the brief');
    const notice = await screen.findByRole('alert');
    expect(within(notice).getByText(/Changed the place/)).toBeTruthy();
    expect(field('Machine').value).toBe('Circulation pump 2');
    expect(onSaved).not.toHaveBeenCalled();
    await press('refetch');
    await press('Keep my changes, take theirs for the rest');
    expect(field('Machine').value).toBe('Circulation pump 2');
    expect(field('Place on the machine').value).toBe('Free end');
    await press('Save the brief');
    await waitFor(() => expect(onSaved).toHaveBeenCalled());
    expect(save).toHaveBeenLastCalledWith({ ...briefDocument, machine: 'Circulation pump 2', place: 'Free end' }, 3);
  });

  it('keeps unsaved text on this device and offers it again', async () => {
    const first = edit(vi.fn<Save>());
    await userEvent.type(field('Machine'), ', rebuilt');
    first.unmount();
    edit(vi.fn<Save>());
    expect(field('Machine').value).toBe('Circulation pump, rebuilt');
    await press('Discard it');
    expect(field('Machine').value).toBe('Circulation pump');
  });

  it('adds and removes requirements, and names a new one after its quantity', async () => {
    const save = vi.fn<Save>(() => Promise.resolve(brief));
    edit(save);
    await press('Add a requirement');
    const row = screen.getByRole('group', { name: 'Requirement 2' });
    await userEvent.selectOptions(within(row).getByLabelText('Quantity'), 'displacementPeak');
    expect(within(row).getByLabelText<HTMLInputElement>('Title').value).toBe('Displacement, peak');
    await userEvent.selectOptions(within(row).getByLabelText('Comparison'), 'atMost');
    await userEvent.type(within(row).getByLabelText('Limit'), '0.16 in');
    await press('Remove requirement 1');
    await press('Save the brief');
    await waitFor(() => expect(save).toHaveBeenCalled());
    expect(save.mock.calls[0]?.[0].requirements).toMatchObject([
      { title: 'Displacement, peak', quantity: 'displacementPeak', comparison: 'atMost', limit: 0.004064, unit: 'in' },
    ]);
  });
});
