import { Plus } from 'lucide-react';
import { useMemo, useState } from 'react';
import type { Instrument } from '#contracts/instruments';
import { formatDate } from '../../lib/format';
import { ActionButton } from '../../ui/action-button';
import { Button } from '../../ui/button';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { EmptyState } from '../../ui/empty-state';
import { Status } from '../../ui/status';
import { InstrumentDialog } from './instrument-dialog';

const columns: readonly TableColumn<Instrument>[] = [
  {
    id: 'number',
    title: 'Number',
    value: ({ number }) => number,
    cell: ({ number }) => <span className="font-mono whitespace-nowrap">{number}</span>,
  },
  { id: 'name', title: 'Instrument', value: ({ name }) => name },
  {
    id: 'serial',
    title: 'Serial',
    value: ({ serial }) => serial,
    cell: ({ serial }) => <span className="font-mono">{serial}</span>,
  },
  { id: 'location', title: 'Where', value: ({ location }) => location },
  {
    id: 'calibration',
    title: 'Calibration',
    value: ({ inCalibration }) => (inCalibration ? 'in calibration' : 'out of calibration'),
    cell: ({ inCalibration }) => (
      <Status tone={inCalibration ? 'good' : 'attention'} className="whitespace-nowrap">
        {inCalibration ? 'in calibration' : 'out of calibration'}
      </Status>
    ),
  },
  {
    id: 'due',
    title: 'Due',
    value: ({ calibrationDue }) => calibrationDue,
    cell: ({ calibrationDue }) => <span className="whitespace-nowrap">{formatDate(calibrationDue)}</span>,
  },
  { id: 'uncertainty', title: 'Uncertainty', value: ({ uncertainty }) => uncertainty },
];

interface RegisterProps {
  instruments: readonly Instrument[];
  mayChange: boolean;
}

/** The instruments of the bench with the state of their calibration. */
export function InstrumentsRegister({ instruments, mayChange }: RegisterProps) {
  const [open, setOpen] = useState<Instrument | 'new' | null>(null);
  const withButton = useMemo(
    (): readonly TableColumn<Instrument>[] =>
      mayChange
        ? [
            ...columns,
            {
              id: 'change',
              title: 'Change',
              value: () => null,
              unsortable: true,
              unexported: true,
              align: 'end',
              cell: (instrument) => (
                <Button
                  size="small"
                  className="-my-1.5"
                  variant="quiet"
                  aria-label={`Change ${instrument.number}`}
                  onPress={() => setOpen(instrument)}
                >
                  Change
                </Button>
              ),
            },
          ]
        : columns,
    [mayChange],
  );
  const register = (
    <ActionButton
      icon={Plus}
      whyNot={mayChange ? null : 'Instruments are registered by people with the role bench.'}
      reason="tooltip"
      onPress={() => setOpen('new')}
    >
      Register an instrument
    </ActionButton>
  );
  return (
    <>
      <DataTable
        label="Instruments"
        rows={instruments}
        columns={withButton}
        rowKey={({ id }) => id}
        filterLabel="Find an instrument"
        initialSort={{ column: 'due' }}
        toolbar={register}
        empty={
          <EmptyState title="No instruments yet." action={register}>
            Readings name the instrument they were taken with, and whether it was in calibration that day.
          </EmptyState>
        }
      />
      {open === null ? null : (
        <InstrumentDialog instrument={open === 'new' ? null : open} onClose={() => setOpen(null)} />
      )}
    </>
  );
}
