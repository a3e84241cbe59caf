import { randomUUID } from 'node:crypto';
import { Dossier } from '#contracts/records';
import { canonicalJson, sha256 } from '../../canonical-json';
import { nextReleaseNumber } from '../../numbers';
import type { OpenStep } from '../../way/step';
import { linesOf, summaryOf } from '../runs/reads';
import { evidenceOf } from './evidence';

/** Writes down everything the release rests on, signature included, under the digest of exactly that text. */
export async function keepRecord({
  trx,
  at,
  actor,
  revision,
}: OpenStep): Promise<{ recordId: string; releaseNumber: string; digest: string }> {
  const { design, brief, authors, remarks, signatures, runs } = await evidenceOf(trx, revision);
  const { estimate, documentDigest } = revision;
  if (estimate === null || documentDigest === null) throw new Error(`Revision ${revision.id} was never submitted.`);
  const releaseNumber = await nextReleaseNumber(trx, at);
  const dossier: Dossier = {
    releaseNumber,
    design: { number: design.number, title: design.title, letter: revision.letter },
    brief: { number: brief.number, version: brief.version, document: brief.document },
    document: revision.document,
    documentDigest,
    estimate,
    authors,
    remarks,
    signatures,
    runs: runs.map((run) => ({
      ...summaryOf(run),
      specimen: run.specimen,
      lines: linesOf(brief.document.requirements, estimate, run.readings),
      readings: run.readings,
      statement: run.statement,
    })),
  };
  const text = canonicalJson(Dossier.parse(dossier));
  const digest = sha256(text);
  const recordId = randomUUID();
  await trx('records').insert({
    id: recordId,
    release_number: releaseNumber,
    revision_id: revision.id,
    dossier: text,
    digest,
    released_at: at,
    released_by_id: actor.id,
  });
  return { recordId, releaseNumber, digest };
}
