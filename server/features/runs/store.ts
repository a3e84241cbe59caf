import type { Knex } from 'knex';
import { Conditions } from '#contracts/runs';
import type { Reading, Run } from '#contracts/runs';
import type { RunSummary } from '#contracts/revisions';
import { personNames } from '../people/reads';

interface RunRow {
  id: string;
  number: string;
  revision_id: string;
  state: RunSummary['state'];
  result: RunSummary['result'];
  specimen: string;
  conditions: string | null;
  started_at: string;
  started_by_id: string;
  closed_at: string | null;
  statement: string | null;
  stop_reason: string | null;
}

interface ReadingRow {
  id: string;
  run_id: string;
  requirement_id: string | null;
  quantity: string;
  value: number;
  unit: string;
  instrument_id: string;
  instrument_number: string;
  instrument_name: string;
  out_of_calibration_reason: string | null;
  note: string;
  by_id: string;
  at: string;
  struck_by_id: string | null;
  struck_at: string | null;
  struck_reason: string | null;
}

/** One run with all that was read in it. */
export interface StoredRun extends RunSummary {
  revisionId: string;
  specimen: string;
  conditions: Run['conditions'];
  statement: string | null;
  stopReason: string | null;
  readings: Reading[];
}

const nobody = { id: '', name: '' };

async function readingsOf(db: Knex, runIds: readonly string[]): Promise<ReadingRow[]> {
  return db('readings')
    .leftJoin('reading_strikes', 'reading_strikes.reading_id', 'readings.id')
    .whereIn('run_id', [...runIds])
    .orderBy('readings.rowid')
    .select<ReadingRow[]>('readings.*', {
      struck_by_id: 'reading_strikes.by_id',
      struck_at: 'reading_strikes.at',
      struck_reason: 'reading_strikes.reason',
    });
}

async function withReadings(db: Knex, rows: readonly RunRow[]): Promise<StoredRun[]> {
  const readings = await readingsOf(
    db,
    rows.map(({ id }) => id),
  );
  const names = await personNames(db, [
    ...rows.map(({ started_by_id }) => started_by_id),
    ...readings.flatMap(({ by_id, struck_by_id }) => [by_id, struck_by_id]),
  ]);
  const named = (id: string) => names.get(id) ?? nobody;
  const reading = (row: ReadingRow): Reading => ({
    id: row.id,
    requirementId: row.requirement_id,
    quantity: row.quantity,
    value: row.value,
    unit: row.unit,
    instrument: { id: row.instrument_id, number: row.instrument_number, name: row.instrument_name },
    outOfCalibrationReason: row.out_of_calibration_reason,
    note: row.note,
    by: named(row.by_id),
    at: row.at,
    struck:
      row.struck_by_id === null || row.struck_at === null
        ? null
        : { by: named(row.struck_by_id), at: row.struck_at, reason: row.struck_reason ?? '' },
  });
  return rows.map((row) => ({
    id: row.id,
    number: row.number,
    state: row.state,
    result: row.result,
    startedAt: row.started_at,
    startedBy: named(row.started_by_id),
    closedAt: row.closed_at,
    revisionId: row.revision_id,
    specimen: row.specimen,
    conditions: row.conditions === null ? null : Conditions.parse(JSON.parse(row.conditions)),
    statement: row.statement,
    stopReason: row.stop_reason,
    readings: readings.filter(({ run_id }) => run_id === row.id).map(reading),
  }));
}

/** Runs of a revision in the order in which they were started. */
export const runsOfRevision = async (db: Knex, revisionId: string): Promise<StoredRun[]> =>
  withReadings(db, await db<RunRow>('runs').where({ revision_id: revisionId }).orderBy('rowid'));

export async function findRun(db: Knex, id: string): Promise<StoredRun | undefined> {
  const [run] = await withReadings(db, await db<RunRow>('runs').where({ id }));
  return run;
}

/** The short form that lists and pages show. */
export const summaryOf = ({ id, number, state, result, startedAt, startedBy, closedAt }: StoredRun): RunSummary => ({
  id,
  number,
  state,
  result,
  startedAt,
  startedBy,
  closedAt,
});

/** All runs, the latest first. */
export const runsByStart = async (db: Knex): Promise<StoredRun[]> =>
  withReadings(db, await db<RunRow>('runs').orderBy('rowid', 'desc'));
