import { describe, expect, it } from 'vitest';
import {
  differences,
  insertAt,
  joined,
  readAt,
  removeAt,
  sameDocument,
  writeAt,
} from '../../../src/features/design/document-path';
import { changeKind, changeLayout, circuits, suspensions } from '../../../src/features/design/kinds';
import { pathInWords } from '../../../src/features/design/labels';

const draft = {
  layout: 'through',
  magnets: [{ length: '10 mm' }, { length: '5 mm' }],
  suspension: { kind: 'spring', stiffness: '2 kN/m' },
  stops: null,
};

describe('a draft by path', () => {
  it('is changed without touching the one before', () => {
    const next = writeAt(draft, 'magnets.1.length', '6 mm');
    expect(readAt(next, 'magnets.1.length')).toBe('6 mm');
    expect(draft.magnets[1]?.length).toBe('5 mm');
    expect(next.suspension).toBe(draft.suspension);
    expect(Array.isArray(next.magnets)).toBe(true);
  });

  it('loses a key that is emptied, and grows the objects that a value needs', () => {
    expect(writeAt(draft, 'suspension.stiffness', undefined).suspension).toEqual({ kind: 'spring' });
    expect(writeAt(draft, 'stops.lower', '-4 mm').stops).toEqual({ lower: '-4 mm' });
  });

  it('takes and gives back list entries', () => {
    expect(insertAt(draft, 'magnets', { length: '1 mm' }).magnets).toHaveLength(3);
    expect(removeAt(draft, 'magnets', 0).magnets).toEqual([{ length: '5 mm' }]);
    expect(insertAt({}, 'coils', {}).coils).toEqual([{}]);
  });

  it('tells what differs, value by value', () => {
    expect(differences(draft, writeAt(draft, 'magnets.0.length', '11 mm'))).toEqual([
      { path: 'magnets.0.length', mine: '10 mm', theirs: '11 mm' },
    ]);
    expect(sameDocument(draft, structuredClone(draft))).toBe(true);
    expect(differences({ a: 1 }, { a: 1, b: 2 })).toEqual([{ path: 'b', mine: undefined, theirs: 2 }]);
  });

  it('joins two people’s changes where they touch different values', () => {
    const mine = writeAt(draft, 'suspension.stiffness', '3 kN/m');
    const theirs = writeAt(draft, 'magnets.0.length', '12 mm');
    expect(joined(draft, mine, theirs)).toEqual({
      document: writeAt(theirs, 'suspension.stiffness', '3 kN/m'),
      clashes: [],
    });
    const clashing = joined(draft, mine, writeAt(draft, 'suspension.stiffness', '4 kN/m'));
    expect(clashing?.clashes).toEqual(['suspension.stiffness']);
    expect(readAt(clashing?.document, 'suspension.stiffness')).toBe('3 kN/m');
  });

  it('does not join where a list has grown or shrunk: its places mean something else then', () => {
    expect(joined(draft, removeAt(draft, 'magnets', 0), writeAt(draft, 'stops.lower', '-1 mm'))).toBeNull();
    expect(joined(draft, draft, insertAt(draft, 'magnets', { length: '1 mm' }))).toBeNull();
  });

  it('says where a value stands in words', () => {
    expect(pathInWords(draft, 'magnets.1.length')).toBe('Magnet 2, length');
    expect(pathInWords({ coils: [{ shape: 'round' }] }, 'coils.0.innerDiameter')).toBe('Coil, inner diameter');
    expect(pathInWords(draft, 'suspension.stiffness')).toBe('Suspension, stiffness');
    expect(pathInWords(draft, '')).toBe('The document');
  });
});

describe('choosing another kind', () => {
  it('brings back what was typed when the first kind is chosen again', () => {
    const shelf = new Map<string, unknown>();
    const typed = writeAt(draft, 'suspension.stiffness', '3.3 kN/m');
    const helical = changeKind(typed, shelf, 'suspension', 'spring', 'helical', suspensions.helical);
    expect(helical.suspension).toEqual(suspensions.helical);
    const back = changeKind(helical, shelf, 'suspension', 'helical', 'spring', suspensions.spring);
    expect(back.suspension).toEqual({ kind: 'spring', stiffness: '3.3 kN/m' });
    expect(changeKind(back, shelf, 'circuit', 'resistor', 'resistor', circuits.resistor)).toBe(back);
  });

  it('changes the layout with all parts that only it knows, and back', () => {
    const shelf = new Map<string, unknown>();
    const levitated = { ...draft, suspension: suspensions.levitated, misalignment: { offset: '0.2 mm' } };
    const across = changeLayout(levitated, shelf, 'across');
    expect(readAt(across, 'magnets.0.shape')).toBe('block');
    expect(readAt(across, 'suspension.kind')).toBe('spring');
    expect(across.misalignment).toBeUndefined();
    const back = changeLayout(across, shelf, 'through');
    expect(back.magnets).toEqual(draft.magnets);
    expect(back.misalignment).toEqual({ offset: '0.2 mm' });
  });
});
