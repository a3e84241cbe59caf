import { useSuspenseQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { revisionStates, stateWords } from '#workflows/revision';
import type { RevisionState } from '#workflows/revision';
import { DesignsTable } from '../features/designs/designs-table';
import { designsQuery } from '../features/designs/queries';
import { stateTone } from '../features/revision/state-tone';
import { SmallStrip } from '../features/strip/small-strip';
import { queryClient } from '../lib/query-client';
import { ButtonLink } from '../ui/button';
import { PageBody, PageHeader } from '../ui/page-header';
import { Select } from '../ui/select';
import { Status } from '../ui/status';

export const loader = () => queryClient.query({ ...designsQuery, staleTime: 'static' });

const drawing = (document: unknown) => <SmallStrip document={document} />;
const stateMark = (state: RevisionState) => (
  <Status tone={stateTone[state]} className="whitespace-nowrap">
    {stateWords[state]}
  </Status>
);

export function Component() {
  const { designs, mayCreate } = useSuspenseQuery(designsQuery).data;
  const [search, setSearch] = useSearchParams();
  const state = revisionStates.find((each) => each === search.get('state')) ?? '';
  const shown = useMemo(
    () => (state === '' ? designs : designs.filter(({ latest }) => latest.state === state)),
    [designs, state],
  );
  const present = revisionStates.filter(
    (each) => each === state || designs.some(({ latest }) => latest.state === each),
  );
  return (
    <>
      <PageHeader
        title="Designs"
        meta="One generator for one brief each, shown by its latest revision."
        actions={
          mayCreate ? (
            <ButtonLink to="/designs/new" variant="primary">
              Start a design
            </ButtonLink>
          ) : null
        }
      />
      <PageBody>
        <DesignsTable
          designs={shown}
          filtered={state !== ''}
          {...{ mayCreate, drawing, stateMark }}
          toolbar={
            <Select
              label="State"
              labelHidden
              className="w-52"
              placeholder="in any state"
              choices={present.map((value) => ({ value, label: stateWords[value] }))}
              value={state}
              onChange={(next) => setSearch(next ? { state: next } : {}, { replace: true })}
            />
          }
        />
      </PageBody>
    </>
  );
}
