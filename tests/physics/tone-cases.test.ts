import { describe, expect, it } from 'vitest';
import { respond } from '#physics/models/response';
import { deviceOf, missesOf, readCase, vibrationOf } from './device-of-case';

describe('tones and spectra into a linear device', () => {
  it.each(['D5-05', 'D5-06', 'D6-04'])('meet every figure of case %s to 1e-8', (id) => {
    const stated = readCase(id);
    // the method is exact: the case's tolerances allow for a simulated record
    const tight = stated.expect.map((line) => (line.relative ? { ...line, relative: 1e-8 } : line));
    expect(missesOf({ ...stated, expect: tight }, respond(deviceOf(stated), vibrationOf(stated)))).toEqual([]);
  });
});

describe('a recording into a linear device', () => {
  it('meets every figure of case D5-01, a hundred times tighter', () => {
    const stated = readCase('D5-01');
    const tight = stated.expect.map((line) => (line.relative ? { ...line, relative: line.relative / 100 } : line));
    expect(missesOf({ ...stated, expect: tight }, respond(deviceOf(stated), vibrationOf(stated)))).toEqual([]);
  });
});

describe('a tone into a resistor', () => {
  it.each(['D1-01', 'D1-02', 'D1-03', 'D1-05', 'D1-07', 'D2-01', 'D2-03', 'D3-01', 'D3-02', 'D3-04'])(
    'meets every figure of case %s',
    (id) => {
      const stated = readCase(id);
      const answer = respond(deviceOf(stated), vibrationOf(stated));
      expect(missesOf(stated, answer)).toEqual([]);
    },
  );
});
