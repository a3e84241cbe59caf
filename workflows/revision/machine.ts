import { assign, setup } from 'xstate';
import type { Actor, RevisionFacts, RunResult } from './vocabulary';
import { completesApproval, mayHappen } from './rules';

export type RevisionEvent =
  | { type: 'submit'; actor: Actor }
  | { type: 'remark'; actor: Actor; remarkId: string; blocking: boolean }
  | { type: 'closeRemark'; actor: Actor; remarkId: string; blocking: boolean }
  | { type: 'approve'; actor: Actor }
  | { type: 'requestChanges'; actor: Actor }
  | { type: 'rework'; actor: Actor; letter: string }
  | { type: 'startRun'; actor: Actor; runId: string; missingReadings: string[] }
  | { type: 'stopRun'; actor: Actor }
  | { type: 'signResult'; actor: Actor; result: RunResult }
  | { type: 'retest'; actor: Actor }
  | { type: 'grantConcession'; actor: Actor }
  | { type: 'returnToBench'; actor: Actor }
  | { type: 'release'; actor: Actor }
  | { type: 'supersede'; actor: Actor }
  | { type: 'recall'; actor: Actor }
  | { type: 'abandon'; actor: Actor };

const runClosed = { openRunId: null, openRunStartedBy: null, missingReadings: [], readingsMeet: null };

/**
 * The way of a revision. Only the server's stored state name and facts go in and out (`resolveState`); there are no
 * timers and no invoked actors, so that the chart can be restored at any time. Guards call the rules and nothing else.
 */
export const revisionMachine = setup({
  types: { context: {} as RevisionFacts, events: {} as RevisionEvent, input: {} as RevisionFacts },
  guards: {
    allowed: ({ context, event }) => mayHappen(context, event) === true,
    allowedAndComplete: ({ context, event }) => mayHappen(context, event) === true && completesApproval(context),
    allowedConforming: ({ context, event }) =>
      mayHappen(context, event) === true && event.type === 'signResult' && event.result === 'conforming',
  },
  actions: {
    // Who submits stands for the revision as much as who typed it, and may not decide on it afterwards.
    countSubmitter: assign({
      authorIds: ({ context, event }) =>
        context.authorIds.includes(event.actor.id) ? context.authorIds : [...context.authorIds, event.actor.id],
    }),
    countApproval: assign({ approvedBy: ({ context, event }) => [...context.approvedBy, event.actor.id] }),
    openRemark: assign(({ context, event }) =>
      event.type === 'remark'
        ? {
            openRemarkIds: [...context.openRemarkIds, event.remarkId],
            openBlockingRemarks: context.openBlockingRemarks + (event.blocking ? 1 : 0),
          }
        : {},
    ),
    closeRemark: assign(({ context, event }) =>
      event.type === 'closeRemark'
        ? {
            openRemarkIds: context.openRemarkIds.filter((id) => id !== event.remarkId),
            openBlockingRemarks: context.openBlockingRemarks - (event.blocking ? 1 : 0),
          }
        : {},
    ),
    openRun: assign(({ event }) =>
      event.type === 'startRun'
        ? {
            openRunId: event.runId,
            openRunStartedBy: event.actor.id,
            missingReadings: event.missingReadings,
            readingsMeet: null,
          }
        : {},
    ),
    closeRun: assign(runClosed),
    keepResult: assign(({ event }) => (event.type === 'signResult' ? { ...runClosed, lastResult: event.result } : {})),
    keepConcession: assign({ concessionGranted: true }),
    keepContinuation: assign(({ event }) => (event.type === 'rework' ? { continuedAs: event.letter } : {})),
    forgetResult: assign({ lastResult: null, concessionGranted: false }),
  },
}).createMachine({
  id: 'revision',
  context: ({ input }) => input,
  initial: 'draft',
  states: {
    draft: {
      on: {
        submit: { target: 'inReview', guard: 'allowed', actions: 'countSubmitter' },
        abandon: { target: 'abandoned', guard: 'allowed' },
      },
    },
    inReview: {
      on: {
        remark: { guard: 'allowed', actions: 'openRemark' },
        closeRemark: { guard: 'allowed', actions: 'closeRemark' },
        approve: [
          { target: 'clearedForBench', guard: 'allowedAndComplete', actions: 'countApproval' },
          { guard: 'allowed', actions: 'countApproval' },
        ],
        requestChanges: { target: 'changesRequested', guard: 'allowed' },
        abandon: { target: 'abandoned', guard: 'allowed' },
      },
    },
    changesRequested: {
      on: {
        closeRemark: { guard: 'allowed', actions: 'closeRemark' },
        rework: { target: 'reworked', guard: 'allowed', actions: 'keepContinuation' },
        abandon: { target: 'abandoned', guard: 'allowed' },
      },
    },
    clearedForBench: {
      on: {
        startRun: { target: 'onBench', guard: 'allowed', actions: 'openRun' },
        abandon: { target: 'abandoned', guard: 'allowed' },
      },
    },
    onBench: {
      on: {
        signResult: [
          { target: 'releaseReview', guard: 'allowedConforming', actions: 'keepResult' },
          { target: 'nonconforming', guard: 'allowed', actions: 'keepResult' },
        ],
        stopRun: { target: 'clearedForBench', guard: 'allowed', actions: 'closeRun' },
      },
    },
    nonconforming: {
      on: {
        rework: { target: 'reworked', guard: 'allowed', actions: 'keepContinuation' },
        retest: { target: 'clearedForBench', guard: 'allowed', actions: 'forgetResult' },
        grantConcession: { target: 'releaseReview', guard: 'allowed', actions: 'keepConcession' },
        abandon: { target: 'abandoned', guard: 'allowed' },
      },
    },
    releaseReview: {
      on: {
        remark: { guard: 'allowed', actions: 'openRemark' },
        closeRemark: { guard: 'allowed', actions: 'closeRemark' },
        requestChanges: { target: 'changesRequested', guard: 'allowed' },
        returnToBench: { target: 'clearedForBench', guard: 'allowed', actions: 'forgetResult' },
        release: { target: 'released', guard: 'allowed' },
        abandon: { target: 'abandoned', guard: 'allowed' },
      },
    },
    released: {
      on: {
        // What is released stays in force while its successor is drafted, reviewed and tested.
        rework: { guard: 'allowed', actions: 'keepContinuation' },
        supersede: { target: 'superseded', guard: 'allowed' },
        recall: { target: 'recalled', guard: 'allowed' },
      },
    },
    superseded: { on: { recall: { target: 'recalled', guard: 'allowed' } } },
    recalled: { on: { rework: { guard: 'allowed', actions: 'keepContinuation' } } },
    reworked: {},
    abandoned: {},
  },
});
