import { render, renderHook, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { eventsOf, revisionStates, stateWords } from '#workflows/revision';
import { chooseEvents } from '../../../src/features/revision/event-choice';
import { eventForms, isSigned, readEvent, emptyFields } from '../../../src/features/revision/event-forms';
import { RevisionWay } from '../../../src/features/revision/revision-way';
import { targetWords } from '../../../src/features/revision/revision-subject';
import { useRevisionWay } from '../../../src/features/revision/use-revision-way';
import { mainWay, stages } from '../../../src/features/revision/way-stages';
import { digest, idOf, revision } from '../../support/client-samples';

describe('the way of a revision as it is drawn', () => {
  it('follows the chart from draft to release', () => {
    expect(mainWay()).toEqual(['draft', 'inReview', 'clearedForBench', 'onBench', 'releaseReview', 'released']);
    expect(stages).toEqual(['draft', 'review', 'bench', 'release']);
  });

  it.each(revisionStates)('knows in “%s” the events of the chart and where they lead', (state) => {
    const { result } = renderHook(() => useRevisionWay(state));
    expect(result.current.state).toBe(state);
    expect(new Set(result.current.events.map(({ type }) => type))).toEqual(new Set(eventsOf(state)));
    expect(result.current.ended).toBe(eventsOf(state).length === 0);
  });

  it('tells of a result that it leads on or back', () => {
    const { result } = renderHook(() => useRevisionWay('onBench'));
    expect(result.current.events.find(({ type }) => type === 'signResult')?.leadsTo).toEqual([
      'releaseReview',
      'nonconforming',
    ]);
  });

  it.each(revisionStates)('marks where a revision in “%s” stands, in words', (state) => {
    render(<RevisionWay revision={{ ...revision, state }} />);
    const current = screen.getAllByRole('listitem').filter((item) => item.getAttribute('aria-current') === 'step');
    expect(current).toHaveLength(1);
    expect(current[0]?.textContent).toContain(`Revision B, ${stateWords[state].toLowerCase()}`);
  });

  it('puts an abandoned revision after the stage it had reached', () => {
    render(<RevisionWay revision={{ ...revision, state: 'abandoned' }} />);
    const words = screen.getAllByRole('listitem').map((item) => item.textContent);
    expect(words.findIndex((word) => word?.includes('abandoned'))).toBe(
      words.findIndex((word) => word?.startsWith('review')) + 1,
    );
  });
});

describe('the choice among steps', () => {
  const events = ['remark', 'closeRemark', 'requestChanges', 'returnToBench', 'release', 'abandon'].map((type) => ({
    type: type as 'remark',
    leadsTo: [],
  }));

  it('puts the possible step onward first, ends last, and closes remarks where they stand', () => {
    const choice = chooseEvents(events, {
      availableEvents: ['remark', 'closeRemark', 'requestChanges', 'release', 'abandon'],
      whyNot: { returnToBench: 'Not now.' },
    });
    expect(choice.primary?.type).toBe('release');
    expect(choice.beside.map(({ type }) => type)).toEqual(['remark', 'requestChanges']);
    expect(choice.further.map(({ type }) => type)).toEqual(['returnToBench', 'abandon']);
  });

  it('never offers what the server did not name', () => {
    expect(chooseEvents(events, { availableEvents: [], whyNot: {} })).toEqual({
      primary: null,
      beside: [],
      further: [],
    });
  });
});

describe('a step as it is sent', () => {
  const filled = {
    ...emptyFields,
    text: 'a',
    answer: 'b',
    reason: 'c',
    specimen: 'd',
    result: 'conforming' as const,
    statement: 'e',
    shortfall: 'f',
    password: 'g',
  };
  const held = { version: 4, digest, remarkId: idOf(70) };

  it.each(Object.keys(eventForms) as (keyof typeof eventForms)[])(
    '“%s” is complete by its contract once its fields are filled',
    (type) => {
      const read = readEvent(type, filled, held);
      if (!read.ok) throw new Error(JSON.stringify(read.issues));
      expect(read.event).toMatchObject({
        type,
        version: 4,
        ...(isSigned(type) ? { password: 'g', signedDigest: digest } : {}),
      });
    },
  );

  it.each(Object.keys(eventForms) as (keyof typeof eventForms)[])(
    'every issue of an empty “%s” stands at one of its fields',
    (type) => {
      const read = readEvent(type, emptyFields, held);
      const places = read.ok ? [] : read.issues.map(({ path }) => path);
      expect(eventForms[type].fields).toEqual(expect.arrayContaining(places));
    },
  );

  it('says of a value what it is in words', () => {
    expect(targetWords('magnets.0.length')).toBe('Magnets 1, length');
    expect(targetWords('response.loadPower')).toBe('Power into the load');
    expect(targetWords('suspension.neutralAt')).toBe('Suspension, neutral at');
  });
});
