import type { Knex } from 'knex';
import { notFound } from '../../errors';

export interface InstrumentRow {
  id: string;
  number: string;
  version: number;
  name: string;
  serial: string;
  location: string;
  calibration_due: string;
  uncertainty: string;
  created_at: string;
  updated_at: string;
}

export const loadInstruments = (db: Knex): Promise<InstrumentRow[]> =>
  db<InstrumentRow>('instruments').orderBy('number');

export async function loadInstrument(db: Knex, id: string): Promise<InstrumentRow> {
  const row = await db<InstrumentRow>('instruments').where({ id }).first();
  if (row === undefined) throw notFound('This instrument');
  return row;
}

/** A calibration holds to the end of its last day, UTC. */
export const calibrationHolds = ({ calibration_due }: Pick<InstrumentRow, 'calibration_due'>, at: string): boolean =>
  at.slice(0, 10) <= calibration_due;
