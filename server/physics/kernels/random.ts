import { portableLog } from './portable';

/**
 * Uniform numbers in [0, 1) from a 32-bit seed: the same sequence on every machine, integer arithmetic only.
 *
 * Source: sfc32 (Doty-Humphrey, PractRand), seeded by 12 rounds over the seed; period about 2^128.
 * @throws RangeError where the seed is not a whole number from 0 to 2^53.
 */
export function uniformRandom(seed: number): () => number {
  if (!Number.isInteger(seed) || seed < 0 || seed > Number.MAX_SAFE_INTEGER)
    throw new RangeError(`seed must be a whole number from 0 to 2^53 - 1, got ${seed}`);
  let a = 0x9e3779b9 | 0;
  let b = seed | 0;
  let c = Math.floor(seed / 4294967296) | 0;
  let count = 1;
  const next = (): number => {
    const sum = (((a + b) | 0) + count) | 0;
    count = (count + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (c << 21) | (c >>> 11);
    c = (c + sum) | 0;
    return sum >>> 0;
  };
  for (let n = 0; n < 12; n++) next();
  // 53 bits: 27 from one draw and 26 from the next
  return () => ((next() >>> 5) * 67108864 + (next() >>> 6)) / 9007199254740992;
}

/**
 * Standard normal numbers from a uniform source, by the polar method; portable arithmetic, so the same everywhere.
 * Source: Marsaglia & Bray, SIAM Rev. 6 (1964) 260.
 */
export function normalRandom(uniform: () => number): () => number {
  let spare: number | null = null;
  return () => {
    if (spare !== null) {
      const held = spare;
      spare = null;
      return held;
    }
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const square = x * x + y * y;
      if (square >= 1 || square < 1e-300) continue;
      const scale = Math.sqrt((-2 * portableLog(square)) / square);
      spare = y * scale;
      return x * scale;
    }
  };
}
