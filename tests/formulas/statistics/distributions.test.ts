/**
 * Distributions beside R (reference/statistics.R), jstat (seven to eight digits), simple-statistics and a printed
 * table.
 */
import * as fc from 'fast-check';
import { jStat } from 'jstat';
import { probit } from 'simple-statistics';
import { normalCdf, OutOfRangeError } from '@/formulas';
import {
  chiSquareQuantile,
  chiSquareUpperTail,
  fQuantile,
  fUpperTail,
} from '@/formulas/statistics/f-and-chi-square';
import { logGamma } from '@/formulas/statistics/gamma-function';
import { incompleteBeta } from '@/formulas/statistics/incomplete-beta';
import { upperIncompleteGamma } from '@/formulas/statistics/incomplete-gamma';
import { normalQuantile, twoSidedNormal } from '@/formulas/statistics/normal-quantile';
import {
  studentCdf,
  studentQuantile,
  studentTwoSided,
  twoSidedStudent,
} from '@/formulas/statistics/student-t';
import reference from '../reference/statistics.json';

const relative = (given: number, wanted: number) => Math.abs(given - wanted) / Math.abs(wanted);
const share = fc.double({ min: 1e-6, max: 1 - 1e-6, noNaN: true });

describe('the normal quantile', () => {
  it.each(reference.normalQuantile)('at $share agrees with R', ({ share: at, value }) => {
    expect(Math.abs(normalQuantile(at) - value)).toBeLessThan(at < 1e-6 ? 1e-5 : 1e-11);
  });

  it('inverts the distribution function', () => {
    fc.assert(fc.property(share, (at) => expect(normalCdf(normalQuantile(at))).toBeCloseTo(at, 12)));
  });

  it('agrees with simple-statistics to its accuracy', () => {
    for (const at of [0.01, 0.2, 0.6, 0.95]) expect(normalQuantile(at)).toBeCloseTo(probit(at), 2);
  });

  it('is 1.96 for a two-sided 0.95', () => {
    expect(twoSidedNormal(0.95)).toBeCloseTo(1.959963984540054, 12);
    expect(Object.is(normalQuantile(0.5) + 0, 0)).toBe(true);
  });

  it.each([0, 1, NaN, 1.2])('refuses %d', (at) => expect(() => normalQuantile(at)).toThrow(OutOfRangeError));
});

describe("Student's t", () => {
  it.each(reference.t)('up to $t with $df agrees with R and jstat', (row) => {
    expect(studentCdf(row.t, row.df)).toBeCloseTo(row.cdf, 12);
    expect(relative(studentTwoSided(row.t, row.df), row.twoSided)).toBeLessThan(1e-9);
    expect(studentCdf(row.t, row.df)).toBeCloseTo(jStat.studentt.cdf(row.t, row.df), 8);
  });

  it.each(reference.tQuantile)('quantile $share with $df agrees with R', (row) => {
    expect(relative(studentQuantile(row.share, row.df), row.value)).toBeLessThan(1e-9);
  });

  // NIST/SEMATECH e-Handbook of Statistical Methods, upper critical values, 0.05, 0.025 and 0.001.
  it.each([
    [1, 6.314, 12.706],
    [2, 2.92, 4.303],
    [5, 2.015, 2.571],
    [10, 1.812, 2.228],
    [20, 1.725, 2.086],
    [29, 1.699, 2.045],
    [60, 1.671, 2],
    [100, 1.66, 1.984],
  ])('with %d degrees of freedom stands in the printed table', (df, at05, at025) => {
    expect(studentQuantile(0.95, df).toFixed(3)).toBe(at05.toFixed(3));
    expect(twoSidedStudent(0.95, df).toFixed(3)).toBe(at025.toFixed(3));
  });

  it('is symmetric and nears the normal', () => {
    fc.assert(
      fc.property(share, fc.integer({ min: 1, max: 500 }), (at, df) => {
        expect(studentCdf(studentQuantile(at, df), df)).toBeCloseTo(at, 10);
        expect(studentQuantile(1 - at, df)).toBeCloseTo(-studentQuantile(at, df), 5);
      }),
    );
    expect(twoSidedStudent(0.95, 1e7)).toBeCloseTo(1.95996, 5);
    expect(studentQuantile(0.5, 3)).toBe(0);
  });

  it('refuses degrees of freedom that are not positive', () => {
    expect(() => studentCdf(1, 0)).toThrow(OutOfRangeError);
    expect(() => twoSidedStudent(1, 3)).toThrow(OutOfRangeError);
  });
});

describe('F and chi-square', () => {
  it.each(reference.f)('F $f with $numerator and $denominator agrees with R and jstat', (row) => {
    expect(relative(fUpperTail(row.f, row), row.upper)).toBeLessThan(1e-9);
    expect(fUpperTail(row.f, row)).toBeCloseTo(
      1 - jStat.centralF.cdf(row.f, row.numerator, row.denominator),
      7,
    );
  });

  it.each(reference.chiSquare)('chi-square $chiSquare with $df agrees with R and jstat', (row) => {
    expect(relative(chiSquareUpperTail(row.chiSquare, row.df), row.upper)).toBeLessThan(1e-10);
    expect(chiSquareUpperTail(row.chiSquare, row.df)).toBeCloseTo(
      1 - jStat.chisquare.cdf(row.chiSquare, row.df),
      8,
    );
  });

  it('quantiles agree with R', () => {
    for (const row of reference.fQuantile) {
      expect(relative(fQuantile(row.share, row), row.value)).toBeLessThan(1e-9);
    }
    for (const row of reference.chiSquareQuantile) {
      expect(relative(chiSquareQuantile(row.share, row.df), row.value)).toBeLessThan(1e-9);
    }
  });

  it('F with two degrees of freedom has a closed form', () => {
    fc.assert(
      fc.property(share, fc.integer({ min: 1, max: 300 }), (at, denominator) => {
        const closed = (denominator / 2) * (Math.pow(1 - at, -2 / denominator) - 1);

        expect(relative(fQuantile(at, { numerator: 2, denominator }), closed)).toBeLessThan(1e-7);
      }),
    );
  });

  it('F of one degree is t squared, chi-square of one the square of a normal', () => {
    expect(fUpperTail(2.5 ** 2, { numerator: 1, denominator: 12 })).toBeCloseTo(studentTwoSided(2.5, 12), 14);
    expect(chiSquareUpperTail(1.7 ** 2, 1)).toBeCloseTo(2 * normalCdf(-1.7), 14);
    expect(chiSquareUpperTail(0, 3)).toBe(1);
    expect(fUpperTail(0, { numerator: 2, denominator: 9 })).toBe(1);
  });

  it('refuse what is negative', () => {
    expect(() => chiSquareUpperTail(-1, 3)).toThrow(OutOfRangeError);
    expect(() => fUpperTail(-1, { numerator: 2, denominator: 9 })).toThrow(OutOfRangeError);
    expect(() => fUpperTail(1, { numerator: 0, denominator: 9 })).toThrow(OutOfRangeError);
    expect(() => fQuantile(0, { numerator: 2, denominator: 9 })).toThrow(OutOfRangeError);
  });
});

describe('the functions behind them', () => {
  it.each(reference.logGamma)('log-gamma of $x agrees with R and jstat', ({ x, value }) => {
    expect(Math.abs(logGamma(x) - value)).toBeLessThan(1e-12 * Math.max(1, Math.abs(value)));
    expect(logGamma(x)).toBeCloseTo(jStat.gammaln(x), 8);
  });

  it('incomplete beta mirrors and agrees with jstat', () => {
    const shape = fc.double({ min: 0.2, max: 40, noNaN: true });
    fc.assert(
      fc.property(share, shape, shape, (x, first, second) => {
        const value = incompleteBeta(x, { first, second });

        expect(value).toBeCloseTo(1 - incompleteBeta(1 - x, { first: second, second: first }), 11);
        expect(Math.abs(value - jStat.ibeta(x, first, second))).toBeLessThan(1e-6);
      }),
    );
    expect(incompleteBeta(0, { first: 2, second: 3 })).toBe(0);
    expect(incompleteBeta(1, { first: 2, second: 3 })).toBe(1);
  });

  it('incomplete gamma of shape 1 is the exponential', () => {
    for (const x of [0.1, 1, 1.99, 2.01, 9]) {
      expect(upperIncompleteGamma(x, 1)).toBeCloseTo(Math.exp(-x), 14);
    }
  });

  it('refuse what they are not defined for', () => {
    expect(() => logGamma(0)).toThrow(OutOfRangeError);
    expect(() => incompleteBeta(1.1, { first: 1, second: 1 })).toThrow(OutOfRangeError);
    expect(() => upperIncompleteGamma(-1, 1)).toThrow(OutOfRangeError);
  });
});
