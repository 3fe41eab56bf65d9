/**
 * Both sides of every branch. A formula is continuous where its paper is; the jumps that are inherent are asserted
 * with their size, so that a wrong coefficient shows.
 */
import * as fc from 'fast-check';
import { formulaIds, powerForRefraction, prepareFormula } from '@/formulas';
import { cornealHeightRadicand, correctedAxialLengthMm } from '@/formulas/third-generation/srkt';
import { anEye, anyFormulaWithConstants, averageConstants } from '../support/eyes';
import type { FormulaId, FormulaOptions } from '@/formulas';

const HAIR = 1e-9;
const EDGES_MM = [18.5, 22, 23, 24.2, 25, 25.326, 26.5, 27, 31];

const elp = (formula: FormulaId, axialLengthMm: number, keratometryD: number, options?: FormulaOptions) =>
  prepareFormula(formula, anEye(axialLengthMm, keratometryD), averageConstants[formula], options).elpMm;
const power = (formula: FormulaId, axialLengthMm: number, options?: FormulaOptions) =>
  powerForRefraction(formula, anEye(axialLengthMm, 43.5), 0, averageConstants[formula], options).powerD;

const inherentJumpMm: Partial<Record<string, number>> = { 'hofferQ 23': 0.0011, 'srkt 24.2': 0.00068 };

describe('continuity in the axial length', () => {
  it.each(formulaIds.flatMap((formula) => EDGES_MM.map((edgeMm) => ({ formula, edgeMm }))))(
    '$formula at $edgeMm mm',
    ({ formula, edgeMm }) => {
      const jumpMm = Math.abs(elp(formula, edgeMm + HAIR, 43.5) - elp(formula, edgeMm - HAIR, 43.5));
      const allowedMm = inherentJumpMm[`${formula} ${edgeMm}`] ?? 0;

      expect(jumpMm).toBeGreaterThanOrEqual(allowedMm * 0.5);
      expect(jumpMm).toBeLessThan(allowedMm * 1.5 + 1e-7);
    },
  );

  it('SRK/T bends at 24.2 mm without a jump: 0.0015 mm with 1.716, but 0.0227 mm with 1.715', () => {
    const at = (coefficient: number) => -3.446 + coefficient * 24.2 - 0.0237 * 24.2 ** 2;

    expect(correctedAxialLengthMm(24.2)).toBe(24.2);
    expect(correctedAxialLengthMm(24.2 + HAIR) - 24.2).toBeCloseTo(0.0015, 4);
    expect(at(1.716) - 24.2).toBeCloseTo(0.0015, 4);
    expect(at(1.715) - 24.2).toBeCloseTo(-0.0227, 4);
  });

  it('no formula jumps anywhere else', () => {
    const anyLength = fc.double({ min: 14.1, max: 39.9, noNaN: true });
    fc.assert(
      fc.property(anyFormulaWithConstants, anyLength, ({ formula, constants }, axialLengthMm) => {
        fc.pre(!EDGES_MM.some((edgeMm) => Math.abs(edgeMm - axialLengthMm) < 1e-6));
        const at = (mm: number) => prepareFormula(formula, anEye(mm, 43), constants).elpMm;

        expect(Math.abs(at(axialLengthMm + 1e-7) - at(axialLengthMm))).toBeLessThan(1e-6);
      }),
      { numRuns: 500 },
    );
  });
});

describe('continuity in the cornea', () => {
  it('Holladay 1 at a radius of 7.00 mm, where the floor sets in', () => {
    const edgeD = 337.5 / 7;

    const jumpMm = elp('holladay1', 23, edgeD + HAIR) - elp('holladay1', 23, edgeD - HAIR);

    expect(Math.abs(jumpMm)).toBeLessThan(1e-7);
  });

  it.each(['zero', 'absolute'] as const)(
    'SRK/T where the radicand passes zero (%s rule)',
    (srktNegativeRadicand) => {
      const edgeMm = radicandZeroMm(46);

      const before = elp('srkt', edgeMm - 1e-10, 46, { srktNegativeRadicand });
      const after = elp('srkt', edgeMm + 1e-10, 46, { srktNegativeRadicand });

      expect(cornealHeightRadicand(edgeMm - 1e-6, 46)).toBeGreaterThan(0);
      expect(cornealHeightRadicand(edgeMm + 1e-6, 46)).toBeLessThan(0);
      // A square root: a hair of 1e-10 in the radicand shows as 1e-5.
      expect(Math.abs(after - before)).toBeLessThan(5e-5);
    },
  );

  it('SRK/T keeps the lens behind by the zero rule and brings it forward again by the absolute rule', () => {
    const eye = anEye(31, 47);

    const zero = powerForRefraction('srkt', eye, 0, { aConstant: 118.9 });
    const absolute = powerForRefraction(
      'srkt',
      eye,
      0,
      { aConstant: 118.9 },
      { srktNegativeRadicand: 'absolute' },
    );

    // H = r by the zero rule: lens plane = r + 0.62467 A - 68.747 - 3.336.
    expect(zero.elpMm).toBeCloseTo(337.5 / 47 + 0.62467 * 118.9 - 72.083, 10);
    expect(absolute.elpMm).toBeLessThan(zero.elpMm - 0.5);
  });
});

describe('the Wang-Koch lines', () => {
  it.each([
    ['holladay1', 'wangKoch2011', 25, -0.0112],
    ['haigis', 'wangKoch2011', 25, -0.223],
    ['hofferQ', 'wangKoch2011', 25, -0.0956],
    ['holladay1', 'wangKoch2018', 26.5, -0.1482],
    ['srkt', 'wangKoch2018', 27, -0.0996],
  ] as const)(
    '%s %s jumps at %d mm by %d mm, and not before',
    (formula, axialLengthAdjustment, edgeMm, jumpMm) => {
      const options = { axialLengthAdjustment };

      expect(power(formula, edgeMm, options)).toBe(power(formula, edgeMm));
      expect(power(formula, edgeMm + HAIR, options)).toBeCloseTo(power(formula, edgeMm + jumpMm), 6);
    },
  );

  it('the SRK/T line of 2011 sets in at 25.565 mm without a jump, because it never lengthens an eye', () => {
    const options = { axialLengthAdjustment: 'wangKoch2011' } as const;
    const crossingMm = 3.7222 / (1 - 0.8544);

    expect(crossingMm).toBeCloseTo(25.565, 3);
    expect(power('srkt', 25.3, options)).toBe(power('srkt', 25.3));
    expect(power('srkt', crossingMm + HAIR, options)).toBeCloseTo(
      power('srkt', crossingMm - HAIR, options),
      6,
    );
    expect(power('srkt', 27, options)).toBeCloseTo(power('srkt', 0.8544 * 27 + 3.7222), 10);
  });
});

/** By bisection: where SRK/T's radicand passes zero. */
function radicandZeroMm(keratometryD: number): number {
  let lower = 25;
  let upper = 35;
  for (let i = 0; i < 80; i += 1) {
    const middle = (lower + upper) / 2;
    if (cornealHeightRadicand(middle, keratometryD) > 0) lower = middle;
    else upper = middle;
  }
  return (lower + upper) / 2;
}
