import type { Actor, RevisionFacts, Role } from '#workflows/revision';

/** The cast of the workflow tests: who they are says which roles they hold. */
const person = (id: string, ...roles: Role[]): Actor => ({ id, roles });
export const cast = {
  author: person('author', 'designer'),
  colleague: person('colleague', 'designer'),
  reviewer: person('reviewer', 'reviewer'),
  secondReviewer: person('secondReviewer', 'reviewer'),
  bench: person('bench', 'bench'),
  authority: person('authority', 'releaseAuthority'),
  administrator: person('administrator', 'administrator'),
  observer: person('observer', 'observer'),
  nobody: person('nobody'),
  /** Wrote the revision and also reviews: the second role must not help. */
  authorWhoReviews: person('author', 'designer', 'reviewer'),
  authorWhoReleases: person('author', 'designer', 'releaseAuthority'),
  authorWithEveryRole: person(
    'author',
    'designer',
    'reviewer',
    'bench',
    'releaseAuthority',
    'administrator',
    'observer',
  ),
  /** Edited an earlier revision from which this one was drafted. */
  earlierEditor: person('earlierEditor', 'designer', 'reviewer', 'releaseAuthority'),
  benchWhoReviews: person('benchWhoReviews', 'bench', 'reviewer'),
  reviewerWhoReleases: person('reviewerWhoReleases', 'reviewer', 'releaseAuthority'),
} as const;

/** Facts of a fresh draft that could be submitted. */
export const freshFacts: RevisionFacts = {
  authorIds: ['author'],
  submitObstacles: [],
  approvalsNeeded: 1,
  approvedBy: [],
  openBlockingRemarks: 0,
  openRemarkIds: [],
  openRunId: null,
  openRunStartedBy: null,
  missingReadings: [],
  readingsMeet: null,
  lastResult: null,
  concessionGranted: false,
  laterReleased: null,
  continuedAs: null,
};
