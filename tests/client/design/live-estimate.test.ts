import { describe, expect, it } from 'vitest';
import type { Estimate } from '#contracts/estimates';
import { barShare, marginsInWords } from '../../../src/features/results/requirement-margins';
import { designPath, follow, freshnessOf, issueAt, nothingYet } from '../../../src/features/results/live-estimate';
import type { EstimateEvent, LiveEstimate } from '../../../src/features/results/live-estimate';

const estimate = (loadPower: number) => ({ response: { loadPower } }) as Estimate;
const after = (...events: EstimateEvent[]): LiveEstimate => events.reduce(follow, nothingYet);
const answered = (request: string, loadPower: number): EstimateEvent[] => [
  { type: 'asked', request },
  { type: 'answered', request, design: request, estimate: estimate(loadPower) },
];

describe('an estimate that follows the typing', () => {
  it('is current only for exactly what stands in the fields', () => {
    const state = after(...answered('a', 1));
    expect(freshnessOf(state, 'a')).toBe('current');
    expect(freshnessOf(state, 'b')).toBe('computing');
    expect(freshnessOf(nothingYet, 'a')).toBe('none');
  });

  it('keeps the previous figures while the next are computed', () => {
    const state = after(...answered('a', 1), { type: 'asked', request: 'b' });
    expect(state.shown).toEqual(estimate(1));
    expect(state.shownDesign).toBe('a');
    expect(freshnessOf(state, 'b')).toBe('computing');
  });

  it('never shows an answer to an older question, however late it comes', () => {
    const state = after(
      { type: 'asked', request: 'a' },
      { type: 'asked', request: 'b' },
      { type: 'answered', request: 'b', design: 'b', estimate: estimate(2) },
      { type: 'answered', request: 'a', design: 'a', estimate: estimate(1) },
      { type: 'refused', request: 'a', design: 'a', issues: [] },
      { type: 'failed', request: 'a', message: 'late' },
    );
    expect(state.shown).toEqual(estimate(2));
    expect(freshnessOf(state, 'b')).toBe('current');
  });

  it('says that the figures are of the last valid state when a field is wrong, and is current again when it is mended', () => {
    const design = { coils: [{ turns: '1e9' }] };
    const issues = [{ path: 'design.coils.0.turns', message: 'is too large.' }];
    const wrong = after(
      ...answered('a', 1),
      { type: 'asked', request: 'b' },
      { type: 'refused', request: 'b', design, issues },
    );
    expect(freshnessOf(wrong, 'b')).toBe('faulty');
    expect(wrong.shown).toEqual(estimate(1));
    expect(issueAt(wrong, design, 'coils.0.turns')).toBe('is too large');
    expect(issueAt(wrong, { coils: [{ turns: '900' }] }, 'coils.0.turns')).toBeUndefined();
    expect(issueAt(wrong, design, 'coils.0.length')).toBeUndefined();
    expect(freshnessOf(wrong, 'a')).toBe('current');
  });

  it('tells when no answer came', () => {
    const state = after(
      ...answered('a', 1),
      { type: 'asked', request: 'b' },
      { type: 'failed', request: 'b', message: 'No answer.' },
    );
    expect(freshnessOf(state, 'b')).toBe('failed');
    expect(freshnessOf(follow(state, { type: 'asked', request: 'b' }), 'b')).toBe('computing');
  });

  it('tells paths of the design from those of the brief', () => {
    expect(designPath('design.magnets.0.length')).toBe('magnets.0.length');
    expect(designPath('design')).toBe('');
    expect(designPath('vibration.frequency')).toBeNull();
    expect(designPath('magnets.0.length')).toBe('magnets.0.length');
  });
});

describe('margins', () => {
  it('put the limit in the middle of the bar', () => {
    expect(barShare(1, 1)).toBe(0.5);
    expect(barShare(1.3, 1)).toBeCloseTo(0.65, 12);
    expect(barShare(9, 1)).toBe(1);
    expect(barShare(1, 0)).toBeNull();
  });

  it('are counted in words', () => {
    const requirement = {
      id: '00000000-0000-4000-8000-000000000000',
      title: 'Power',
      quantity: 'loadPower',
      comparison: 'atLeast',
      limit: 1,
      unit: 'W',
      shownBy: 'both',
    } as const;
    expect(marginsInWords([requirement, { ...requirement, limit: 3 }], estimate(2))).toBe('meets 1 of 2');
    expect(marginsInWords([], null)).toBe('');
  });
});
