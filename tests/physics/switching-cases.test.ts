import { describe, expect, it } from 'vitest';
import { respond } from '#physics/models/response';
import { deviceOf, missesOf, readCase, vibrationOf } from './device-of-case';

/** How much tighter than the case's tolerance these methods come out. */
const TIGHTER: Record<string, number> = { 'D4-01': 20, 'D4-05': 100, 'D4-06': 1000, 'D4-09': 1000 };

describe('stops and rectifiers', () => {
  it.each(['D3-06', 'D4-01', 'D4-03', 'D4-05', 'D4-06', 'D4-09', 'D5-04', 'D6-01'])(
    'meet every figure of case %s',
    (id) => {
      const stated = readCase(id);
      const expected = stated.expect.map((line) =>
        line.relative ? { ...line, relative: line.relative / (TIGHTER[id] ?? 1) } : line,
      );
      const answer = respond(deviceOf(stated), vibrationOf(stated));
      expect(missesOf({ ...stated, expect: expected }, answer)).toEqual([]);
    },
  );
});
