/**
 * Seeded random numbers — the same numbers for the same seed on every machine, so that a resampled interval or a
 * division into folds can be computed again.
 *
 * Inputs: seed, a whole number; only its lowest 32 bits count.
 * Result: uniform() in [0, 1) with 53 bits; integerBelow(n) in 0 to n - 1; normal() with mean 0 and SD 1.
 * Outside the valid range: throws OutOfRangeError for a seed that is no whole number.
 * Source: xoshiro128**: Blackman, Vigna, ACM Trans Math Softw 2021;47(4):36 [N: ten numbers of the authors' reference
 *   program are reproduced]; normal deviates: Marsaglia, Bray, SIAM Rev 1964;6:260-264 (polar method) [M].
 * Erratum / variant: the four words of state come from the seed by the 32-bit finaliser of MurmurHash3 over steps of
 *   the golden ratio [M]; any other spreading of the seed would do. Not for secrets.
 */
import { OutOfRangeError } from '../errors';

export interface RandomSource {
  uniform(): number;
  integerBelow(count: number): number;
  normal(): number;
}

const ANY_WHOLE_NUMBER = { min: Number.MIN_SAFE_INTEGER, max: Number.MAX_SAFE_INTEGER };

export function randomFromSeed(seed: number): RandomSource {
  if (!Number.isSafeInteger(seed)) throw new OutOfRangeError('seed', seed, ANY_WHOLE_NUMBER);
  return randomFromWords(wordGenerator(spreadSeed(seed)));
}

function randomFromWords(nextWord: () => number): RandomSource {
  const uniform = () => ((nextWord() >>> 5) * 67108864 + (nextWord() >>> 6)) / 9007199254740992;
  let spare: number | undefined;
  const normal = () => {
    if (spare !== undefined) {
      const kept = spare;
      spare = undefined;
      return kept;
    }
    for (;;) {
      const across = 2 * uniform() - 1;
      const up = 2 * uniform() - 1;
      const square = across * across + up * up;
      if (square >= 1 || square === 0) continue;
      const stretch = Math.sqrt((-2 * Math.log(square)) / square);
      spare = up * stretch;
      return across * stretch;
    }
  };
  return { uniform, integerBelow: (count) => Math.floor(uniform() * count), normal };
}

/** xoshiro128**: 32 bits at a time from four words of state, not all zero. */
export function wordGenerator([first, second, third, fourth]: [
  number,
  number,
  number,
  number,
]): () => number {
  let [a, b, c, d] = [first | 0, second | 0, third | 0, fourth | 0];
  return () => {
    const word = Math.imul(rotate(Math.imul(b, 5), 7), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotate(d, 11);
    return word;
  };
}

function rotate(word: number, by: number): number {
  return (word << by) | (word >>> (32 - by));
}

function spreadSeed(seed: number): [number, number, number, number] {
  const word = (step: number) => {
    let mixed = (seed + Math.imul(step, 0x9e3779b9)) | 0;
    mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
    mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
    return mixed ^ (mixed >>> 16);
  };
  return [word(1), word(2), word(3), word(4)];
}
