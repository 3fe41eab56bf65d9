import * as fc from 'fast-check';
import { DivergedError } from '@/formulas/solvers/diverged-error';
import { findBracket } from '@/formulas/solvers/bracket';
import { findRoot } from '@/formulas/solvers/root';

const errorOf = (work: () => unknown): unknown => {
  try {
    return work();
  } catch (error) {
    return error;
  }
};

describe('a bracketed root', () => {
  it.each([
    ['cos x = x', (x: number) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    ['x³ = 2', (x: number) => x ** 3 - 2, 0, 2, 1.2599210498948732],
    ['e^x = 5', (x: number) => Math.exp(x) - 5, -10, 10, 1.6094379124341003],
    ['a flat start', (x: number) => (x - 1) ** 9, -3, 6, 1],
    ['a jump', (x: number) => (x < 0.3 ? -1 : 1), 0, 1, 0.3],
  ])('%s', (_, valueAt, low, high, expected) => {
    const { value, iterations } = findRoot(valueAt, { low, high, tolerance: 1e-12 });

    expect(Math.abs(value - expected)).toBeLessThan(2e-12);
    expect(iterations).toBeLessThan(70);
  });

  it('takes few steps where the function is smooth', () => {
    const { iterations } = findRoot((x) => Math.exp(x) - 5, { low: 0, high: 3, tolerance: 1e-12 });

    expect(iterations).toBeLessThan(12);
  });

  it('finds the root of any increasing cubic, within its bracket', () => {
    const number = fc.double({ min: -50, max: 50, noNaN: true });
    fc.assert(
      fc.property(number, fc.double({ min: 0.01, max: 5, noNaN: true }), (root, slope) => {
        const valueAt = (x: number) => (x - root) ** 3 + slope * (x - root);
        const { value } = findRoot(valueAt, { low: -60, high: 70, tolerance: 1e-10 });

        expect(Math.abs(value - root)).toBeLessThan(1e-9);
      }),
    );
  });

  it('meets a root at either end without a step', () => {
    expect(findRoot((x) => x, { low: 0, high: 3, tolerance: 1e-9 })).toEqual({ value: 0, iterations: 0 });
    expect(findRoot((x) => x - 3, { low: 0, high: 3, tolerance: 1e-9 })).toEqual({ value: 3, iterations: 0 });
    expect(Object.is(findRoot((x) => x, { low: -0, high: 3, tolerance: 1e-9 }).value, 0)).toBe(true);
  });

  it('refuses a bracket without a sign change', () => {
    const error = errorOf(() => findRoot((x) => x * x + 1, { low: -1, high: 2, tolerance: 1e-9 }));

    expect(error).toBeInstanceOf(DivergedError);
    expect(error).toMatchObject({ reason: 'no sign change', iterations: 0 });
  });

  it('diverges at the limit of steps instead of giving its last guess', () => {
    const error = errorOf(() =>
      findRoot((x) => Math.cos(x) - x, { low: 0, high: 1, tolerance: 1e-15, iterationLimit: 3 }),
    );

    expect(error).toBeInstanceOf(DivergedError);
    expect(error).toMatchObject({ reason: 'iteration limit', iterations: 3 });
  });

  it('diverges where the function gives no number', () => {
    const error = errorOf(() =>
      findRoot((x) => (x > 0.4 && x < 0.9 ? NaN : x - 0.8), { low: 0, high: 1, tolerance: 1e-9 }),
    );

    expect(error).toMatchObject({ name: 'DivergedError', reason: 'not a number' });
  });
});

describe('a widening bracket', () => {
  const limits = { min: -100, max: 100 };

  it('stops at the first width that holds the root', () => {
    expect(findBracket((x) => x - 5, { start: 0, step: 1, limits })).toEqual({ low: -8, high: 8 });
    expect(findBracket((x) => x - 0.5, { start: 0, step: 1, limits })).toEqual({ low: -1, high: 1 });
  });

  it('does not pass its limits', () => {
    const bracket = findBracket((x) => x - 99, { start: 90, step: 6, limits });

    expect(bracket).toEqual({ low: 78, high: 100 });
  });

  it('diverges when the limits hold no root', () => {
    const error = errorOf(() => findBracket((x) => x - 101, { start: 0, step: 1, limits }));

    expect(error).toMatchObject({ name: 'DivergedError', reason: 'no sign change' });
  });

  it('diverges where the function gives no number', () => {
    const error = errorOf(() => findBracket(Math.sqrt, { start: 1, step: 2, limits }));

    expect(error).toMatchObject({ name: 'DivergedError', reason: 'not a number' });
  });
});
