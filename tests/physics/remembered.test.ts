import { expect, test } from 'vitest';
import { remembered } from '#physics/remembered';

test('computes once for each key, and forgets what was asked longest ago', () => {
  const asked: number[] = [];
  const square = remembered(
    (value: number) => {
      asked.push(value);
      return value * value;
    },
    String,
    2,
  );
  expect([square(2), square(3), square(2)]).toEqual([4, 9, 4]);
  expect(asked).toEqual([2, 3]);
  square(4);
  expect(square(2)).toBe(4);
  expect(asked).toEqual([2, 3, 4]);
  square(3);
  expect(asked).toEqual([2, 3, 4, 3]);
});
