import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { requirementQuantities } from '#contracts/requirement';
import type { Requirement } from '#contracts/requirement';
import type { Conditions, ReadingCreate, Run } from '#contracts/runs';
import type { Issue } from '#contracts/error';
import type { z } from 'zod';
import { parseQuantity } from '#physics/quantity';
import { offersFor } from '#workflows/revision';
import type { Actor } from '#workflows/revision';
import type { Deps } from '../../app';
import { conflict, invalid, notFound } from '../../errors';
import { loadRevision } from '../../way/revisions';
import { conclude, openStep } from '../../way/step';
import type { OpenStep } from '../../way/step';
import { briefAt } from '../briefs/reads';
import { calibrationHolds, loadInstrument } from '../instruments/reads';
import { digestOf, evidenceOf } from '../revisions/reads';
import { benchFacts, benchRequirements, linesOf } from './lines';
import { findRun, summaryOf } from './store';
import type { StoredRun } from './store';

type Needed = Pick<Deps, 'db' | 'now'>;

async function loadRun(db: Knex, id: string): Promise<StoredRun> {
  const run = await findRun(db, id);
  if (run === undefined) throw notFound('This run');
  return run;
}

function whyNotRecord({ state }: StoredRun, { roles }: Actor): string | null {
  if (state === 'signed') return 'The result of this run is signed; nothing in it changes any more.';
  if (state === 'stopped') return 'This run was stopped; nothing in it changes any more.';
  return roles.includes('bench') ? null : 'This needs the role bench.';
}

/** A run with its lines. Steps that belong to an open run are offered on that run only. */
export async function readRun({ db }: Pick<Deps, 'db'>, id: string, actor: Actor): Promise<Run> {
  const run = await loadRun(db, id);
  const revision = await loadRevision(db, run.revisionId);
  const evidence = await evidenceOf(db, revision);
  const { design, brief } = evidence;
  const refusal = whyNotRecord(run, actor);
  const { availableEvents, whyNot } = offersFor(revision.state, revision.facts, actor);
  const mine = (type: string): boolean =>
    revision.facts.openRunId === null || revision.facts.openRunId === id || !['signResult', 'stopRun'].includes(type);
  return {
    ...summaryOf(run),
    revision: {
      id: revision.id,
      letter: revision.letter,
      version: revision.version,
      designId: design.id,
      designNumber: design.number,
      designTitle: design.title,
      digest: digestOf(evidence),
    },
    specimen: run.specimen,
    conditions: run.conditions,
    lines: linesOf(brief.document.requirements, revision.estimate, run.readings),
    readings: run.readings,
    statement: run.statement,
    stopReason: run.stopReason,
    mayRecord: refusal === null,
    whyNotRecord: refusal,
    availableEvents: availableEvents.filter(mine),
    whyNot: Object.fromEntries(Object.entries(whyNot).filter(([type]) => mine(type))),
  };
}

interface OpenRun {
  open: OpenStep;
  run: StoredRun;
  requirements: Requirement[];
}

/** Begins a change of an open run, inside its transaction. */
async function openRun(trx: Knex.Transaction, deps: Needed, id: string, actor: Actor): Promise<OpenRun> {
  const run = await loadRun(trx, id);
  const open = await openStep(trx, deps, actor, run.revisionId, null);
  const refusal = whyNotRecord(run, actor);
  if (refusal !== null) throw conflict(refusal);
  const brief = await briefAt(trx, open.revision.briefId, open.revision.briefVersion);
  return { open, run, requirements: benchRequirements(brief.document.requirements) };
}

/** Facts of the revision once the readings of its run have changed. */
async function factsAfter({ open, run, requirements }: OpenRun): Promise<OpenStep['revision']['facts']> {
  const { readings } = await loadRun(open.trx, run.id);
  return { ...open.revision.facts, ...benchFacts(linesOf(requirements, open.revision.estimate, readings)) };
}

export async function recordConditions(
  deps: Needed,
  id: string,
  conditions: z.infer<typeof Conditions>,
  actor: Actor,
): Promise<Run> {
  await deps.db.transaction(async (trx) => {
    const { open, run } = await openRun(trx, deps, id, actor);
    await trx('runs')
      .where({ id })
      .update({ conditions: JSON.stringify(conditions) });
    const { state, facts } = open.revision;
    await conclude(
      open,
      { state, facts },
      { deed: 'statedConditions', detail: { runId: id, run: run.number, ...conditions } },
    );
  });
  return readRun(deps, id, actor);
}

/** What is wrong with a reading beyond its form. */
function faultsOf(
  { requirementId, unit, outOfCalibrationReason, instrumentId }: ReadingCreate,
  requirements: readonly Requirement[],
  calibrated: boolean,
  calibrationDue: string,
): Issue[] {
  const requirement = requirements.find(({ id }) => id === requirementId);
  const issues: Issue[] = [];
  if (requirementId !== null && requirement === undefined) {
    issues.push({
      path: 'requirementId',
      value: requirementId,
      message: 'This is not a requirement that this run has to show.',
    });
  }
  if (requirement !== undefined) {
    const { dimension, label } = requirementQuantities[requirement.quantity];
    if (!parseQuantity(`1 ${unit}`, dimension).ok) {
      issues.push({ path: 'unit', value: unit, message: `${label} is not measured in “${unit}”.` });
    }
  }
  if (!calibrated && (outOfCalibrationReason ?? '') === '') {
    issues.push({
      path: 'outOfCalibrationReason',
      value: instrumentId,
      message: `The calibration of this instrument ended on ${calibrationDue}. Say why it was used all the same, or take another.`,
      limit: calibrationDue,
    });
  }
  return issues;
}

/** Enters a reading. An instrument out of calibration is taken only with the reason why. */
export async function addReading(deps: Needed, id: string, body: ReadingCreate, actor: Actor): Promise<Run> {
  await deps.db.transaction(async (trx) => {
    const context = await openRun(trx, deps, id, actor);
    const { open, run, requirements } = context;
    const instrument = await loadInstrument(trx, body.instrumentId).catch(() => {
      throw invalid([{ path: 'instrumentId', value: body.instrumentId, message: 'There is no such instrument.' }]);
    });
    const calibrated = calibrationHolds(instrument, open.at);
    const issues = faultsOf(body, requirements, calibrated, instrument.calibration_due);
    if (issues.length > 0) throw invalid(issues, issues[0]?.message);
    const readingId = randomUUID();
    const outOfCalibrationReason = calibrated ? null : body.outOfCalibrationReason;
    await trx('readings').insert({
      id: readingId,
      run_id: id,
      requirement_id: body.requirementId,
      quantity: body.quantity,
      value: body.value,
      unit: body.unit,
      instrument_id: instrument.id,
      instrument_number: instrument.number,
      instrument_name: instrument.name,
      calibration_due: instrument.calibration_due,
      out_of_calibration_reason: outOfCalibrationReason,
      note: body.note,
      by_id: actor.id,
      at: open.at,
    });
    const { quantity, value, unit } = body;
    const used = { instrument: instrument.number, calibrationDue: instrument.calibration_due, outOfCalibrationReason };
    await conclude(
      open,
      { state: open.revision.state, facts: await factsAfter(context) },
      { deed: 'tookReading', detail: { runId: id, run: run.number, readingId, quantity, value, unit, ...used } },
    );
  });
  return readRun(deps, id, actor);
}

/** Strikes a reading through: it stays visible with who, when and why, and no longer counts. */
export async function strikeReading(
  deps: Needed,
  id: string,
  readingId: string,
  reason: string,
  actor: Actor,
): Promise<Run> {
  await deps.db.transaction(async (trx) => {
    const context = await openRun(trx, deps, id, actor);
    const { open, run } = context;
    const reading = run.readings.find((candidate) => candidate.id === readingId);
    if (reading === undefined) throw notFound('This reading');
    if (reading.struck !== null) throw conflict('This reading is struck through already.');
    await trx('reading_strikes').insert({ reading_id: readingId, by_id: actor.id, at: open.at, reason });
    await conclude(
      open,
      { state: open.revision.state, facts: await factsAfter(context) },
      { deed: 'struckReading', detail: { runId: id, run: run.number, readingId, quantity: reading.quantity, reason } },
    );
  });
  return readRun(deps, id, actor);
}
