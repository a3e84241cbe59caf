import type { Knex } from 'knex';

export async function up(db: Knex): Promise<void> {
  await db.raw(`
    CREATE TABLE instruments (
      id TEXT PRIMARY KEY,
      number TEXT NOT NULL UNIQUE,
      version INTEGER NOT NULL CHECK (version >= 1),
      name TEXT NOT NULL CHECK (name <> ''),
      serial TEXT NOT NULL CHECK (serial <> ''),
      location TEXT NOT NULL,
      calibration_due TEXT NOT NULL CHECK (date(calibration_due) = calibration_due),
      uncertainty TEXT NOT NULL,
      created_at TEXT NOT NULL,
      updated_at TEXT NOT NULL
    ) STRICT`);
  await db.raw(`
    CREATE TABLE runs (
      id TEXT PRIMARY KEY,
      number TEXT NOT NULL UNIQUE,
      revision_id TEXT NOT NULL REFERENCES revisions (id) ON DELETE RESTRICT,
      state TEXT NOT NULL CHECK (state IN ('open', 'signed', 'stopped')),
      result TEXT CHECK (result IN ('conforming', 'nonconforming')),
      specimen TEXT NOT NULL CHECK (specimen <> ''),
      conditions TEXT CHECK (json_valid(conditions)),
      started_at TEXT NOT NULL,
      started_by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      closed_at TEXT,
      closed_by_id TEXT REFERENCES people (id) ON DELETE RESTRICT,
      statement TEXT,
      stop_reason TEXT,
      CHECK ((state = 'signed') = (result IS NOT NULL)),
      CHECK ((state = 'signed') = (statement IS NOT NULL)),
      CHECK ((state = 'stopped') = (stop_reason IS NOT NULL)),
      CHECK ((state = 'open') = (closed_at IS NULL)),
      CHECK ((closed_at IS NULL) = (closed_by_id IS NULL))
    ) STRICT`);
  await db.raw('CREATE INDEX runs_revision ON runs (revision_id)');
  await db.raw("CREATE UNIQUE INDEX runs_one_open ON runs (revision_id) WHERE state = 'open'");
  await db.raw(`
    CREATE TRIGGER runs_closed_for_good BEFORE UPDATE ON runs WHEN OLD.state <> 'open'
    BEGIN SELECT RAISE(ABORT, 'a closed run is never changed'); END`);
  await db.raw(`
    CREATE TRIGGER runs_never_deleted BEFORE DELETE ON runs
    BEGIN SELECT RAISE(ABORT, 'a run is never removed'); END`);
  // Name, number and due date of the instrument are kept as they were when the reading was taken.
  await db.raw(`
    CREATE TABLE readings (
      id TEXT PRIMARY KEY,
      run_id TEXT NOT NULL REFERENCES runs (id) ON DELETE RESTRICT,
      requirement_id TEXT,
      quantity TEXT NOT NULL CHECK (quantity <> ''),
      value REAL NOT NULL,
      unit TEXT NOT NULL,
      instrument_id TEXT NOT NULL REFERENCES instruments (id) ON DELETE RESTRICT,
      instrument_number TEXT NOT NULL,
      instrument_name TEXT NOT NULL,
      calibration_due TEXT NOT NULL,
      out_of_calibration_reason TEXT,
      note TEXT NOT NULL,
      by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      at TEXT NOT NULL,
      CHECK (substr(at, 1, 10) <= calibration_due OR trim(out_of_calibration_reason) <> '')
    ) STRICT`);
  await db.raw('CREATE INDEX readings_run ON readings (run_id)');
  await db.raw(`
    CREATE TABLE reading_strikes (
      reading_id TEXT PRIMARY KEY REFERENCES readings (id) ON DELETE RESTRICT,
      by_id TEXT NOT NULL REFERENCES people (id) ON DELETE RESTRICT,
      at TEXT NOT NULL,
      reason TEXT NOT NULL CHECK (reason <> '')
    ) STRICT`);
  await db.raw(`
    CREATE TRIGGER readings_in_open_runs_only BEFORE INSERT ON readings
    WHEN (SELECT state FROM runs WHERE id = NEW.run_id) <> 'open'
    BEGIN SELECT RAISE(ABORT, 'a closed run takes no readings'); END`);
  await db.raw(`
    CREATE TRIGGER reading_strikes_in_open_runs_only BEFORE INSERT ON reading_strikes
    WHEN (SELECT runs.state FROM readings JOIN runs ON runs.id = readings.run_id WHERE readings.id = NEW.reading_id) <> 'open'
    BEGIN SELECT RAISE(ABORT, 'a closed run takes no strikes'); END`);
  for (const table of ['readings', 'reading_strikes']) {
    await db.raw(`
      CREATE TRIGGER ${table}_never_updated BEFORE UPDATE ON ${table}
      BEGIN SELECT RAISE(ABORT, 'what was read is never changed'); END`);
    await db.raw(`
      CREATE TRIGGER ${table}_never_deleted BEFORE DELETE ON ${table}
      BEGIN SELECT RAISE(ABORT, 'what was read is never removed'); END`);
  }
}

export async function down(db: Knex): Promise<void> {
  await db.raw('DROP TABLE reading_strikes');
  await db.raw('DROP TABLE readings');
  await db.raw('DROP TABLE runs');
  await db.raw('DROP TABLE instruments');
}
