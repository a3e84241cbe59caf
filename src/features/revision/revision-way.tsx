import { Fragment } from 'react';
import type { Revision } from '#contracts/revisions';
import { stateWords } from '#workflows/revision';
import { Status } from '../../ui/status';
import { stateTone } from './state-tone';
import { stages, standingOf } from './way-stages';
import type { Stage } from './way-stages';

const stageWords: Record<Stage, string> = { draft: 'draft', review: 'review', bench: 'bench', release: 'release' };

type WayRevision = Pick<Revision, 'letter' | 'state' | 'signatures' | 'runs' | 'submittedAt'>;

/** How far it came before it left the straight way, from what is on record. */
function lastStage({ signatures, runs, submittedAt }: WayRevision): Stage {
  if (runs.some(({ state }) => state === 'signed')) return 'release';
  if (runs.length > 0 || signatures.some(({ event }) => event === 'approve')) return 'bench';
  return submittedAt === null ? 'draft' : 'review';
}

/** Draft — review — bench — release, with where the revision stands set in its place and in its colour. */
export function RevisionWay({ revision }: { revision: WayRevision }) {
  const { letter, state } = revision;
  const standing = standingOf(state);
  const reached = standing.stage ?? lastStage(revision);
  const at = stages.indexOf(reached);
  const here = (
    <Status tone={stateTone[state]}>
      Revision {letter}, {stateWords[state].toLowerCase()}
    </Status>
  );
  // A state that left the way stands after the stage it left; one of a stage stands in its place.
  const left = standing.stage === null;
  return (
    <ol aria-label={`Way of revision ${letter}`} className="flex flex-wrap items-center gap-x-2 gap-y-0.5">
      {stages.map((stage, index) => {
        const current = index === at;
        return (
          <Fragment key={stage}>
            {index > 0 ? (
              <li aria-hidden className="text-(--edge)">
                —
              </li>
            ) : null}
            {current && !left ? (
              <li aria-current="step">{here}</li>
            ) : (
              <li className={index <= at ? 'text-ink' : undefined}>
                {stageWords[stage]}
                <span className="sr-only">{index <= at ? ' (passed)' : ' (ahead)'}</span>
              </li>
            )}
            {current && left ? (
              <>
                <li aria-hidden className="text-(--edge)">
                  —
                </li>
                <li aria-current="step">{here}</li>
              </>
            ) : null}
          </Fragment>
        );
      })}
    </ol>
  );
}
