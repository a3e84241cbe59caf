import { randomUUID } from 'node:crypto';
import type { Instrument, InstrumentChange, InstrumentCreate } from '#contracts/instruments';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { appendAudit } from '../../audit';
import { conflict } from '../../errors';
import { nextNumber } from '../../numbers';
import { lastChangeOf } from '../audit/reads';
import { calibrationHolds, loadInstrument, loadInstruments } from './store';
import type { InstrumentRow } from './store';

type Needed = Pick<Deps, 'db' | 'now'>;

const present = (row: InstrumentRow, at: string): Instrument => ({
  id: row.id,
  number: row.number,
  version: row.version,
  name: row.name,
  serial: row.serial,
  location: row.location,
  calibrationDue: row.calibration_due,
  inCalibration: calibrationHolds(row, at),
  uncertainty: row.uncertainty,
});

export async function listInstruments(
  { db, now }: Needed,
  { roles }: Actor,
): Promise<{ instruments: Instrument[]; mayChange: boolean }> {
  const at = now().toISOString();
  const rows = await loadInstruments(db);
  return { instruments: rows.map((row) => present(row, at)), mayChange: roles.includes('bench') };
}

const columns = ({ name, serial, location, calibrationDue, uncertainty }: InstrumentCreate) => ({
  name,
  serial,
  location,
  calibration_due: calibrationDue,
  uncertainty,
});

export async function createInstrument({ db, now }: Needed, body: InstrumentCreate, actor: Actor): Promise<Instrument> {
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    const row: InstrumentRow = {
      id: randomUUID(),
      number: await nextNumber(trx, 'instrument'),
      version: 1,
      ...columns(body),
      created_at: at,
      updated_at: at,
    };
    await trx<InstrumentRow>('instruments').insert(row);
    const detail = { number: row.number, version: 1, ...body };
    await appendAudit(trx, {
      at,
      actorId: actor.id,
      action: 'created',
      subject: 'instrument',
      subjectId: row.id,
      detail,
    });
    return present(row, at);
  });
}

/** Changes an instrument. Readings already taken keep the calibration they were taken with. */
export async function changeInstrument(
  { db, now }: Needed,
  id: string,
  { version, ...body }: InstrumentChange,
  actor: Actor,
): Promise<Instrument> {
  const at = now().toISOString();
  return db.transaction(async (trx) => {
    const before = await loadInstrument(trx, id);
    if (before.version !== version) {
      throw conflict(
        'This instrument was changed meanwhile.',
        await lastChangeOf(trx, 'instrument', id, before.version),
      );
    }
    const after: InstrumentRow = { ...before, ...columns(body), version: version + 1, updated_at: at };
    await trx<InstrumentRow>('instruments').where({ id, version }).update(after);
    const detail = { number: before.number, version: after.version, before: present(before, at), ...body };
    await appendAudit(trx, { at, actorId: actor.id, action: 'changed', subject: 'instrument', subjectId: id, detail });
    return present(after, at);
  });
}
