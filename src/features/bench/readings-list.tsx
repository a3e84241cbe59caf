import { useState } from 'react';
import type { Reading, Run } from '#contracts/runs';
import { formatAgo, formatDateTime } from '../../lib/format';
import { formatInUnit } from '../../lib/quantities';
import { Button } from '../../ui/button';
import { ConfirmDialog } from '../../ui/confirm-dialog';
import { classNames } from '../../ui/class-names';
import { Quantity } from '../../ui/quantity';
import { Status } from '../../ui/status';
import { tell } from '../../ui/toast';
import { useStrikeReading } from './queries';
import { dimensionOf, quantityWords } from './reading-words';

interface ReadingsListProps {
  run: Run;
  /** Enters the first reading; null where none may be taken. */
  onFirst: (() => void) | null;
}

/** All readings of a run, newest first. A mistake is struck through with its reason and stays readable. */
export function ReadingsList({ run, onFirst }: ReadingsListProps) {
  const [striking, setStriking] = useState<Reading | null>(null);
  const strike = useStrikeReading(run.id);
  const titles = new Map(run.lines.map(({ requirement }) => [requirement.id, requirement.title]));
  const readings = [...run.readings].sort((a, b) => b.at.localeCompare(a.at));
  if (readings.length === 0)
    return (
      <div className="flex flex-wrap items-center gap-3">
        <p className="text-graphite">No readings yet.</p>
        {onFirst ? <Button onPress={onFirst}>Enter the first reading</Button> : null}
      </div>
    );
  return (
    <>
      <ul className="flex flex-col">
        {readings.map((reading) => (
          <li key={reading.id} className="border-b border-rule py-2.5">
            <ReadingItem
              reading={reading}
              title={
                reading.requirementId === null
                  ? 'For information'
                  : (titles.get(reading.requirementId) ?? 'A requirement')
              }
              onStrike={run.mayRecord && reading.struck === null ? () => setStriking(reading) : null}
            />
          </li>
        ))}
      </ul>
      <ConfirmDialog
        title="Strike a reading through"
        isOpen={striking !== null}
        onClose={() => setStriking(null)}
        confirmLabel="Strike it through"
        danger
        reason={{ label: 'Why it does not count', required: true }}
        onConfirm={async ({ reason }) => {
          if (striking === null) return;
          await strike.mutateAsync({ readingId: striking.id, reason });
          tell.done('Reading struck through');
        }}
      >
        {striking ? (
          <p>
            {quantityWords(striking.quantity)}: {shown(striking)}. It stays readable, with your name and this reason,
            and no longer counts.
          </p>
        ) : null}
      </ConfirmDialog>
    </>
  );
}

const shown = ({ value, quantity, unit }: Reading): string => formatInUnit(value, dimensionOf(quantity, unit), unit, 4);

interface ReadingItemProps {
  reading: Reading;
  title: string;
  onStrike: (() => void) | null;
}

function ReadingItem({ reading, title, onStrike }: ReadingItemProps) {
  const { value, quantity, unit, instrument, outOfCalibrationReason, note, by, at, struck } = reading;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_auto] items-start gap-x-4">
      <div className="min-w-0">
        <p className="flex flex-wrap items-baseline gap-x-4">
          <span className={classNames('text-lg', struck && 'line-through decoration-cinnabar decoration-2')}>
            <Quantity
              value={value}
              dimension={dimensionOf(quantity, unit)}
              {...(unit === '' ? {} : { unit })}
              digits={4}
            />
          </span>
          <span className="wrap-anywhere">{title}</span>
          {struck ? <Status tone="bad">struck through</Status> : null}
        </p>
        <p className="text-sm wrap-anywhere text-graphite">
          {quantityWords(quantity) === title ? 'With' : `${quantityWords(quantity)}, with`}{' '}
          <span className="font-mono">{instrument.number}</span> {instrument.name}; {by.name},{' '}
          <time dateTime={at} title={formatDateTime(at)}>
            {formatAgo(at)}
          </time>
        </p>
        {outOfCalibrationReason === null ? null : (
          <p className="mt-0.5 wrap-anywhere">
            <Status tone="attention">out of calibration</Status> {outOfCalibrationReason}
          </p>
        )}
        {note === '' ? null : <p className="mt-0.5 wrap-anywhere whitespace-pre-line">{note}</p>}
        {struck ? (
          <p className="mt-0.5 wrap-anywhere">
            Struck through by {struck.by.name}, {formatAgo(struck.at)}: {struck.reason}
          </p>
        ) : null}
      </div>
      {onStrike ? (
        <Button
          size="small"
          variant="quiet"
          onPress={onStrike}
          aria-label={`Strike through ${shown(reading)}`}
          className="max-sm:min-h-11"
        >
          Strike through
        </Button>
      ) : null}
    </div>
  );
}
