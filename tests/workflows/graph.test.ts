import { describe, expect, it } from 'vitest';
import { eventsOf, eventTypes, offersFor, revisionStates, roles, step } from '#workflows/revision';
import type { Actor } from '#workflows/revision';
import { cast } from './people';
import { everyStop, formsOf } from './walk';

const walkers = [cast.author, cast.reviewer, cast.secondReviewer, cast.bench, cast.authority];
const stops = everyStop(walkers);
const strangers: Actor[] = roles.map((role) => ({ id: `only ${role}`, roles: [role] }));
const everybody: Actor[] = [...Object.values(cast), ...strangers];

describe('the chart as a graph', () => {
  it('reaches every state from a draft', () => {
    expect(new Set(stops.map(({ state }) => state))).toEqual(new Set(revisionStates));
  });

  it('uses every event somewhere, and none where it ends', () => {
    expect(new Set(revisionStates.flatMap(eventsOf))).toEqual(new Set(eventTypes));
    for (const state of ['reworked', 'abandoned'] as const) expect(eventsOf(state)).toEqual([]);
  });

  it('never reaches release without approval, result and a second person', () => {
    const released = stops.filter(({ state }) => state === 'released');
    expect(released.length).toBeGreaterThan(0);
    for (const { facts, path } of released) {
      expect(facts.approvedBy.length).toBeGreaterThanOrEqual(facts.approvalsNeeded);
      expect(facts.approvedBy.filter((id) => facts.authorIds.includes(id))).toEqual([]);
      expect(facts.openBlockingRemarks).toBe(0);
      expect(facts.lastResult === 'conforming' || facts.concessionGranted).toBe(true);
      expect(path).toEqual(expect.arrayContaining(['submit', 'approve', 'startRun', 'signResult', 'release']));
    }
  });

  it('keeps the facts consistent at every stop', () => {
    for (const { state, facts } of stops) {
      expect(facts.openRunId !== null).toBe(state === 'onBench');
      expect(facts.openBlockingRemarks).toBe(facts.openRemarkIds.filter((id) => id.endsWith('!')).length);
      expect(new Set(facts.approvedBy).size).toBe(facts.approvedBy.length);
    }
  });
});

describe('offered and accepted are the same', () => {
  it(`at each of ${stops.length} stops, for every event and ${everybody.length} people`, () => {
    const contradictions: string[] = [];
    let asked = 0;
    for (const { state, facts } of stops) {
      for (const actor of everybody) {
        const { availableEvents, whyNot } = offersFor(state, facts, actor);
        for (const type of eventTypes) {
          asked += 1;
          const outcomes = formsOf(type, actor, facts).map((event) => step(state, facts, event));
          const accepted = outcomes.some((outcome) => outcome.accepted);
          const refused = !accepted && eventsOf(state).includes(type);
          const mute = !accepted && outcomes.some((outcome) => !outcome.accepted && outcome.reason === '');
          if (availableEvents.includes(type) !== accepted || type in whyNot !== refused || mute) {
            contradictions.push(`${state} ${type} by ${actor.id}`);
          }
        }
      }
    }
    expect(asked).toBe(stops.length * everybody.length * eventTypes.length);
    expect(contradictions).toEqual([]);
  });

  it('gives the same reason in the offer as in the refusal', () => {
    for (const { state, facts } of stops) {
      for (const actor of everybody) {
        const { whyNot } = offersFor(state, facts, actor);
        for (const [type, reason] of Object.entries(whyNot)) {
          const [form] = formsOf(type as keyof typeof whyNot, actor, facts);
          if (type === 'closeRemark' || type === 'signResult' || form === undefined) continue;
          expect(step(state, facts, form)).toMatchObject({ accepted: false, reason });
        }
      }
    }
  });

  it('offers an observer or a person without role nothing anywhere', () => {
    for (const { state, facts } of stops) {
      expect(offersFor(state, facts, cast.observer).availableEvents).toEqual([]);
      expect(offersFor(state, facts, cast.nobody).availableEvents).toEqual([]);
      expect(offersFor(state, facts, cast.administrator).availableEvents).toEqual([]);
    }
  });
});
