import { useQuery } from '@tanstack/react-query';
import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { Run } from '#contracts/runs';
import type { ReadingCreate } from '#contracts/runs';
import { emptyReading, readReading } from '../../../src/features/bench/reading-fields';
import { runQuery } from '../../../src/features/bench/queries';
import { RunSheet } from '../../../src/features/bench/run-sheet';
import { forgetCsrfToken } from '../../../src/lib/fetch-json';
import { clientApi } from '../../support/client-api';
import { drawn } from '../../support/client-drawn';
import { idOf, instrument, overdueInstrument, people, powerRequirement, run } from '../../support/client-samples';

const instruments = [instrument, overdueInstrument];

function Page({ initial }: { initial: Run }) {
  const { data } = useQuery({ ...runQuery(initial.id), initialData: initial, staleTime: Infinity });
  return <RunSheet run={data} instruments={instruments} />;
}

const withReading = (body: ReadingCreate): Run => ({
  ...run,
  lines: run.lines.map((line) => ({
    ...line,
    measured: body.value,
    readings: 1,
    margin: body.value - 0.001,
    verdict: 'meets',
  })),
  readings: [
    {
      id: idOf(50),
      ...body,
      instrument: overdueInstrument,
      by: people.bench,
      at: '2026-03-14T10:00:00.000Z',
      struck: null,
    } as unknown as Run['readings'][number],
  ].map(({ instrument: { id, number, name }, ...reading }) => ({
    id: reading.id,
    requirementId: reading.requirementId,
    quantity: reading.quantity,
    value: reading.value,
    unit: reading.unit,
    instrument: { id, number, name },
    outOfCalibrationReason: reading.outOfCalibrationReason,
    note: reading.note,
    by: reading.by,
    at: reading.at,
    struck: reading.struck,
  })),
});

const open = async () => {
  await userEvent.click(screen.getByRole('button', { name: /^Enter a reading for Power/ }));
  return within(screen.getByRole('alertdialog'));
};

describe('a reading as it is entered', () => {
  const fields = { ...emptyReading(powerRequirement, instrument.id), value: '1.31' };

  it('takes a bare number in the unit of the requirement', async () => {
    const read = await readReading(fields, [powerRequirement], instruments);
    expect(read).toMatchObject({
      ok: true,
      body: { value: 0.00131, unit: 'mW', quantity: 'loadPower', requirementId: powerRequirement.id },
    });
  });

  it('keeps another unit that was typed', async () => {
    const read = await readReading({ ...fields, value: '1310 µW' }, [powerRequirement], instruments);
    expect(read).toMatchObject({ ok: true, body: { value: 0.00131, unit: 'µW' } });
  });

  it('refuses another dimension, a missing instrument, and one out of calibration without a reason', async () => {
    const read = await readReading({ ...fields, value: '1.2 V', instrumentId: '' }, [powerRequirement], instruments);
    expect(read.ok ? [] : read.issues.map(({ path }) => path)).toEqual(['value', 'instrumentId']);
    const overdue = await readReading(
      { ...fields, instrumentId: overdueInstrument.id, outOfCalibrationReason: '  ' },
      [powerRequirement],
      instruments,
    );
    expect(overdue.ok ? [] : overdue.issues.map(({ path }) => path)).toEqual(['outOfCalibrationReason']);
  });
});

describe('the page of a run', () => {
  beforeEach(() => forgetCsrfToken());

  it('samples are valid answers', () => {
    expect(Run.safeParse(run).error).toBeUndefined();
  });

  it('asks why an instrument out of calibration is used, and shows the reason with the reading', async () => {
    const api = clientApi({ addReading: ({ body }) => ({ body: withReading(body as ReadingCreate) }) });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<Page initial={run} />);
    const dialog = await open();
    await userEvent.type(dialog.getByRole('textbox', { name: /^Reading/ }), '1.31 mW');
    await userEvent.selectOptions(dialog.getByRole('combobox', { name: /^Instrument/ }), overdueInstrument.id);
    await userEvent.click(dialog.getByRole('button', { name: 'Enter the reading' }));
    const reason = dialog.getByRole('textbox', { name: /Why it was used/ });
    await waitFor(() => expect(reason.getAttribute('aria-invalid')).toBe('true'));
    expect(api.bodies('addReading')).toEqual([]);
    await userEvent.type(reason, 'The other one is away; compared with it last week.');
    await userEvent.click(dialog.getByRole('button', { name: 'Enter the reading' }));
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(api.bodies('addReading')).toEqual([
      {
        requirementId: powerRequirement.id,
        quantity: 'loadPower',
        value: 0.00131,
        unit: 'mW',
        instrumentId: overdueInstrument.id,
        outOfCalibrationReason: 'The other one is away; compared with it last week.',
        note: '',
      },
    ]);
    expect(await screen.findByText(/The other one is away/)).toBeTruthy();
    expect(screen.getByText('out of calibration')).toBeTruthy();
    expect(screen.getByText('meets')).toBeTruthy();
  });

  it('keeps what was typed when the server refuses, at the field it means', async () => {
    const issues = [{ path: 'unit', value: 'mW', message: 'Power into the load is not measured in “mW”.' }];
    vi.stubGlobal('fetch', clientApi({ addReading: () => ({ code: 'invalid', message: 'Refused.', issues }) }).fetch);
    drawn(<Page initial={run} />);
    const dialog = await open();
    await userEvent.type(dialog.getByRole('textbox', { name: /^Reading/ }), '1.31');
    await userEvent.selectOptions(dialog.getByRole('combobox', { name: /^Instrument/ }), instrument.id);
    await userEvent.click(dialog.getByRole('button', { name: 'Enter the reading' }));
    const value = dialog.getByRole<HTMLInputElement>('textbox', { name: /^Reading/ });
    await waitFor(() => expect(value.getAttribute('aria-invalid')).toBe('true'));
    expect(value.value).toBe('1.31');
  });

  it('strikes through with a reason', async () => {
    const taken = withReading({
      requirementId: powerRequirement.id,
      quantity: 'loadPower',
      value: 0.00131,
      unit: 'mW',
      instrumentId: instrument.id,
      outOfCalibrationReason: null,
      note: '',
    });
    const [reading] = taken.readings;
    if (!reading) throw new Error('The sample has a reading.');
    const struck: Run = {
      ...taken,
      readings: [{ ...reading, struck: { by: people.bench, at: reading.at, reason: 'Range was wrong.' } }],
    };
    const api = clientApi({ strikeReading: () => ({ body: struck }) });
    vi.stubGlobal('fetch', api.fetch);
    drawn(<Page initial={taken} />);
    await userEvent.click(screen.getByRole('button', { name: /^Strike through/ }));
    const dialog = within(screen.getByRole('alertdialog'));
    await userEvent.type(dialog.getByRole('textbox'), 'Range was wrong.');
    await userEvent.click(dialog.getByRole('button', { name: 'Strike it through' }));
    expect(await screen.findByText(/Struck through by Mei Lindqvist/)).toBeTruthy();
    expect(api.asked.at(-1)).toMatchObject({
      name: 'strikeReading',
      params: { readingId: reading.id },
      body: { reason: 'Range was wrong.' },
    });
  });

  it('offers no entry where the server says that nothing may be recorded', () => {
    drawn(<Page initial={{ ...run, mayRecord: false, whyNotRecord: 'This needs the role bench.' }} />);
    expect(screen.queryByRole('button', { name: /^Enter a reading for Power/ })).toBeNull();
    expect(screen.getByText('This needs the role bench.')).toBeTruthy();
  });
});
