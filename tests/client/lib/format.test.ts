import { describe, expect, it } from 'vitest';
import { csvOf } from '../../../src/lib/csv';
import {
  formatAgo,
  formatBytes,
  formatCount,
  formatNumber,
  formatPercent,
  formatSigned,
} from '../../../src/lib/format';

describe('figures', () => {
  it.each([
    [1.30013, '1.30'],
    [-6.0606, '−6.06'],
    [0, '0'],
    [999.6, '1000'],
    [12_345, '12\u2009300'],
    [1.979e-9, '1.98·10⁻⁹'],
    [9.996e-5, '0.000100'],
    [0.000117, '0.000117'],
    [2.5e9, '2.50·10⁹'],
    [Infinity, '∞'],
    [NaN, 'not a number'],
  ])('writes %d as %s', (value, text) => {
    expect(formatNumber(value)).toBe(text);
  });

  it('writes signs, parts and counts', () => {
    expect(formatSigned(0.3)).toBe('+0.300');
    expect(formatSigned(-0.3)).toBe('−0.300');
    expect(formatPercent(0.087)).toBe('8.7 %');
    expect(formatCount(1, 'remark')).toBe('1 remark');
    expect(formatCount(12_000, 'row')).toBe('12\u2009000 rows');
    expect(formatBytes(1437)).toBe('1.4 kB');
  });

  it('tells how long ago in the fewest words', () => {
    const now = new Date('2026-03-14T12:00:00Z');
    const ago = (seconds: number) => formatAgo(new Date(now.getTime() - seconds * 1000), now);
    expect([0, 4, 59, 60, 3599, 7200, 2 * 86_400].map(ago)).toEqual([
      'just now',
      '4 s ago',
      '59 s ago',
      '1 min ago',
      '59 min ago',
      '2 h ago',
      '2 days ago',
    ]);
  });
});

describe('csvOf', () => {
  it('quotes what needs it and keeps figures as figures', () => {
    expect(
      csvOf(
        ['Title', 'Power / mW'],
        [
          ['Fan, 24 Hz', 1.3],
          ['say "so"', null],
        ],
      ),
    ).toBe('Title,Power / mW\r\n"Fan, 24 Hz",1.3\r\n"say ""so""",\r\n');
  });

  it('keeps a spreadsheet from taking text for a formula', () => {
    expect(csvOf(['a'], [['=1+1'], ['-0.5'], ['-x']])).toBe("a\r\n'=1+1\r\n-0.5\r\n'-x\r\n");
  });
});
