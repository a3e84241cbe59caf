import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { bringTo, send, startTeam } from '../support/way';
import type { Team } from '../support/way';

let team: Team;
beforeAll(async () => {
  team = await startTeam();
  const released = await bringTo(team, 'released');
  await send(team.designer, released, 'rework');
  const reviewed = await bringTo(team, 'inReview');
  await send(team.reviewer, reviewed, 'remark');
  await send(team.designer, reviewed, 'closeRemark');
  const open = await bringTo(team, 'onBench');
  await team.server.db('runs').where({ revision_id: open.id }).first();
});
afterAll(() => team.close());

/** Somebody with the database in hand and a statement that the server would never send. */
const attempts: [string, string, RegExp][] = [
  ['alter a signature', "UPDATE signatures SET statement = 'other'", /signature is never changed/],
  ['remove a signature', 'DELETE FROM signatures', /signature is never removed/],
  [
    'replace a signature',
    `REPLACE INTO signatures SELECT id, revision_id, by_id, by_name, at, event, meaning, 'other', digest FROM signatures`,
    /signature is never removed/,
  ],
  ['replace a record', 'REPLACE INTO records SELECT * FROM records', /record is never removed/],
  ['alter a reading', 'UPDATE readings SET value = 1', /never changed/],
  ['remove a reading', 'DELETE FROM readings', /never removed/],
  ['alter a record', "UPDATE records SET dossier = '{}'", /record is never changed/],
  ['remove a record', 'DELETE FROM records', /record is never removed/],
  [
    'reopen a signed run',
    "UPDATE runs SET state = 'open', result = NULL WHERE state = 'signed'",
    /closed run is never changed/,
  ],
  [
    'change the result of a signed run',
    "UPDATE runs SET result = 'nonconforming' WHERE state = 'signed'",
    /closed run/,
  ],
  [
    'enter a reading in a signed run',
    `INSERT INTO readings SELECT 'new', run_id, requirement_id, quantity, 9, unit, instrument_id, instrument_number,
       instrument_name, calibration_due, NULL, '', by_id, at FROM readings LIMIT 1`,
    /closed run takes no readings/,
  ],
  [
    'strike a reading of a signed run',
    "INSERT INTO reading_strikes SELECT id, by_id, at, 'late' FROM readings LIMIT 1",
    /closed run takes no strikes/,
  ],
  ['change a submitted document', "UPDATE revisions SET document = '{}' WHERE state = 'released'", /never changed/],
  ['change a stored estimate', "UPDATE revisions SET estimate = '{}' WHERE state = 'inReview'", /never changed/],
  [
    'change what was typed after submission',
    "UPDATE revisions SET draft = '{}' WHERE state = 'inReview'",
    /never changed/,
  ],
  [
    'change the brief version of a submission',
    'UPDATE revisions SET brief_version = NULL WHERE brief_version = 1',
    /never changed/,
  ],
  [
    'make a submitted revision a draft again',
    "UPDATE revisions SET state = 'draft' WHERE state = 'inReview'",
    /draft once only|CHECK/,
  ],
  ['move a revision to another letter', "UPDATE revisions SET letter = 'Z'", /never changes/],
  ['remove a revision', 'DELETE FROM revisions', /never removed/],
  ['submit without an estimate', "UPDATE revisions SET state = 'inReview' WHERE state = 'draft'", /CHECK/],
  ['drop an author', 'DELETE FROM revision_authors', /stays an author/],
  ['swap an author', "UPDATE revision_authors SET since = ''", /stays an author/],
  ['reword a remark', "UPDATE remarks SET text = 'other'", /remark is never changed/],
  ['unblock a remark', 'UPDATE remarks SET blocking = 1 - blocking', /remark is never changed/],
  ['reopen a remark', 'UPDATE remarks SET closed_at = NULL, closed_by_id = NULL, answer = NULL', /closed remark/],
  ['remove a remark', 'DELETE FROM remarks', /remark is never removed/],
  ['rewrite a version of a brief', "UPDATE brief_versions SET document = '{}'", /never changed/],
  ['remove a version of a brief', 'DELETE FROM brief_versions', /never removed/],
  ['remove a person who has signed', 'DELETE FROM people', /FOREIGN KEY/],
  [
    'open a second run of a revision',
    `INSERT INTO runs (id, number, revision_id, state, specimen, started_at, started_by_id)
       SELECT 'second', 'RUN-9999', revision_id, 'open', 'x', started_at, started_by_id FROM runs WHERE state = 'open'`,
    /UNIQUE/,
  ],
  ['put a word into a number', "UPDATE runs SET started_at = NULL WHERE state = 'open'", /NOT NULL/],
];

describe('the database itself refuses to', () => {
  it.each(attempts)('%s', async (_what, sql, refusal) => {
    await expect(team.server.db.raw(sql)).rejects.toThrow(refusal);
  });
});
