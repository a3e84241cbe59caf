import type { Knex } from 'knex';
import type { Cleared, RunListLine } from '#contracts/runs';
import type { z } from 'zod';
import { runsByStart, summaryOf } from './store';

interface Place {
  revision_id: string;
  letter: string;
  design_id: string;
  number: string;
  title: string;
  state_since: string;
}

const places = (db: Knex) =>
  db('revisions').join('designs', 'designs.id', 'revisions.design_id').select<Place[]>({
    revision_id: 'revisions.id',
    letter: 'letter',
    design_id: 'designs.id',
    number: 'designs.number',
    title: 'designs.title',
    state_since: 'state_since',
  });

const placed = ({ letter, design_id, number, title }: Place) => ({
  letter,
  designId: design_id,
  designNumber: number,
  designTitle: title,
});

/** Runs, newest first, and revisions that wait for one. */
export async function listRuns(
  db: Knex,
): Promise<{ runs: z.infer<typeof RunListLine>[]; cleared: z.infer<typeof Cleared>[] }> {
  const found = await runsByStart(db);
  const byRevision = new Map((await places(db)).map((place) => [place.revision_id, place]));
  const cleared = await places(db).where({ state: 'clearedForBench' }).orderBy('state_since');
  return {
    runs: found.flatMap((run) => {
      const place = byRevision.get(run.revisionId);
      return place === undefined ? [] : [{ ...summaryOf(run), revision: { id: run.revisionId, ...placed(place) } }];
    }),
    cleared: cleared.map((place) => ({ revisionId: place.revision_id, ...placed(place), since: place.state_since })),
  };
}
