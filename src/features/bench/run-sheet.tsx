import { useState } from 'react';
import type { Instrument } from '#contracts/instruments';
import type { Run } from '#contracts/runs';
import { formatDateTime } from '../../lib/format';
import { ActionButton } from '../../ui/action-button';
import { KeyFigures } from '../../ui/key-figures';
import { Section } from '../../ui/page-header';
import { RunConditions } from './conditions-form';
import { ReadingDialog } from './reading-dialog';
import { ReadingsList } from './readings-list';
import { RunCautions } from './run-cautions';
import { RunLines } from './run-lines';

/** One bench run: what it has to show, what was read, under which conditions. */
export function RunSheet({ run, instruments }: { run: Run; instruments: readonly Instrument[] }) {
  /** Requirement that a reading is being entered for; '' for information, null while no dialog is open. */
  const [measuring, setMeasuring] = useState<string | null>(null);
  const [instrumentId, setInstrumentId] = useState('');
  return (
    <div className="grid gap-x-10 gap-y-8 xl:grid-cols-[minmax(0,1fr)_24rem]">
      <div className="flex min-w-0 flex-col gap-8">
        <Section title="What it has to show" className="@container">
          <RunLines lines={run.lines} onMeasure={run.mayRecord ? setMeasuring : null} />
        </Section>
        <Section
          title="Readings"
          aside={
            run.state === 'open' ? (
              <ActionButton
                size="small"
                whyNot={run.mayRecord ? null : run.whyNotRecord}
                onPress={() => setMeasuring('')}
              >
                Enter a reading for information
              </ActionButton>
            ) : null
          }
        >
          <ReadingsList
            run={run}
            onFirst={run.mayRecord ? () => setMeasuring(run.lines[0]?.requirement.id ?? '') : null}
          />
        </Section>
      </div>
      <div className="flex min-w-0 flex-col gap-8">
        <Section title="Set-up">
          <KeyFigures
            ruled
            figures={[
              { label: 'Specimen', value: <span className="font-mono wrap-anywhere">{run.specimen}</span> },
              { label: 'Started', value: `${run.startedBy.name}, ${formatDateTime(run.startedAt)}` },
              ...(run.closedAt === null ? [] : [{ label: 'Closed', value: formatDateTime(run.closedAt) }]),
            ]}
          />
          {run.statement === null || run.statement === '' ? null : (
            <p className="wrap-anywhere whitespace-pre-line">
              <span className="font-semibold">Statement: </span>
              {run.statement}
            </p>
          )}
          {run.stopReason === null ? null : (
            <p className="wrap-anywhere whitespace-pre-line">
              <span className="font-semibold">Stopped: </span>
              {run.stopReason}
            </p>
          )}
        </Section>
        <Section title="Conditions">
          <RunConditions run={run} />
        </Section>
        {run.state === 'open' ? (
          <Section title="Before you start">
            <RunCautions run={run} />
          </Section>
        ) : null}
      </div>
      {measuring === null ? null : (
        <ReadingDialog
          run={run}
          instruments={instruments}
          requirementId={measuring}
          instrumentId={instrumentId}
          onInstrument={setInstrumentId}
          onClose={() => setMeasuring(null)}
        />
      )}
    </div>
  );
}
