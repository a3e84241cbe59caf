import { redirect } from 'react-router-dom';
import type { LoaderFunctionArgs } from 'react-router-dom';
import { designQuery, revisionPath } from '../features/designs/queries';
import { queryClient } from '../lib/query-client';
import { RequestError } from '../lib/request-error';

/** A design is read and worked on by its revisions: this leads to the latest. */
export async function loader({ params }: LoaderFunctionArgs) {
  const design = await queryClient.query({ ...designQuery(params.designId ?? ''), staleTime: 0 });
  const latest = design.revisions.reduce<(typeof design.revisions)[number] | undefined>(
    (last, revision) =>
      last === undefined ||
      revision.letter.length > last.letter.length ||
      (revision.letter.length === last.letter.length && revision.letter > last.letter)
        ? revision
        : last,
    undefined,
  );
  if (!latest) throw new RequestError(404, 'notFound', 'No revision of this design is open to you.');
  return redirect(revisionPath(design.id, latest.letter));
}

/** Never drawn: the loader always leads on. */
export const Component = () => null;
