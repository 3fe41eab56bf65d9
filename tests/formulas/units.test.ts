import * as fc from 'fast-check';
import {
  axisDifferenceDeg,
  cornealFromSpectacleD,
  degFromRad,
  haigisDefaultsFromAConstant,
  keratometricCylinderD,
  keratometryDFromRadiusMm,
  meanKeratometryD,
  meanRadiusMm,
  normaliseAxisDeg,
  OutOfRangeError,
  radFromDeg,
  radiusMmFromKeratometryD,
  roundAxisDeg,
  spectacleFromCornealD,
} from '@/formulas';

describe('corneal power', () => {
  it('7.50 mm is 45 D', () => {
    expect(keratometryDFromRadiusMm(7.5)).toBe(45);
    expect(radiusMmFromKeratometryD(45)).toBe(7.5);
  });

  it('mean of the powers and mean of the radii are two different corneas', () => {
    const cornea = { flatRadiusMm: 337.5 / 42, steepRadiusMm: 337.5 / 46 };

    expect(meanKeratometryD(cornea)).toBeCloseTo(44, 12);
    expect(keratometricCylinderD(cornea)).toBeCloseTo(4, 12);
    expect(337.5 / meanRadiusMm(cornea)).toBeCloseTo(43.909, 3);
  });
});

describe('vertex distance', () => {
  it('-10 D at 12 mm is -8.93 D at the cornea, +10 D is +11.36 D', () => {
    expect(cornealFromSpectacleD(-10, 12)).toBeCloseTo(-8.928571, 6);
    expect(cornealFromSpectacleD(10, 12)).toBeCloseTo(11.363636, 6);
  });

  it('refuses to step past the pole', () => {
    expect(() => cornealFromSpectacleD(84, 12)).toThrow(OutOfRangeError);
    expect(() => spectacleFromCornealD(-84, 12)).toThrow(OutOfRangeError);
  });
});

describe('axes', () => {
  it.each([
    [0, 180],
    [180, 180],
    [-0, 180],
    [360, 180],
    [-10, 170],
    [190, 10],
    [0.3, 0.3],
    [90, 90],
    [-1e-16, 180],
  ])('%d is written %d', (axisDeg, written) => expect(normaliseAxisDeg(axisDeg)).toBe(written));

  it.each([
    [0.3, 180],
    [0.5, 1],
    [179.6, 180],
    [180.4, 180],
    [12.4, 12],
  ])('%d is rounded to %d', (axisDeg, rounded) => expect(roundAxisDeg(axisDeg)).toBe(rounded));

  it('are the same after half a turn', () => {
    fc.assert(
      fc.property(fc.integer({ min: -720, max: 720 }), (axisDeg) => {
        const axis = normaliseAxisDeg(axisDeg);

        expect(axis).toBeGreaterThan(0);
        expect(axis).toBeLessThanOrEqual(180);
        expect(normaliseAxisDeg(axisDeg + 180)).toBe(axis);
        expect(axisDifferenceDeg(axisDeg, axis)).toBe(0);
      }),
    );
  });

  it('differ by at most a right angle', () => {
    expect(axisDifferenceDeg(5, 175)).toBe(10);
    expect(axisDifferenceDeg(10, 100)).toBe(90);
    expect(axisDifferenceDeg(120, 20)).toBe(80);
  });

  it('180 degrees are pi', () => {
    expect(radFromDeg(180)).toBe(Math.PI);
    expect(degFromRad(Math.PI / 2)).toBe(90);
  });
});

it('Haigis defaults from an A-constant: a0 = 0.62467 A - 72.434', () => {
  expect(haigisDefaultsFromAConstant(118.5)).toEqual({
    a0Mm: expect.closeTo(0.62467 * 118.5 - 72.434, 10),
    a1: 0.4,
    a2: 0.1,
  });
});
