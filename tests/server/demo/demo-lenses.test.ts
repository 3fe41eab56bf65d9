import { powerForRefraction, type FormulaId } from '@/formulas';
import { BACKUP_LENS, EVERYDAY_LENS } from '@/server/db/seeds/demo-case';
import { demoLenses, everydayLensBefore } from '@/server/db/seeds/demo-lenses';
import {
  FORMULA_IDS,
  LENS_DESIGNS,
  LENS_KINDS,
  lensInputSchema,
  type ConstantOrigin,
  type LensInput,
} from '@/shared/contract';

const lenses = demoLenses();
const AVERAGE_EYE = {
  axialLengthMm: 23.5,
  flatRadiusMm: 7.75,
  steepRadiusMm: 7.6,
  anteriorChamberDepthMm: 3.1,
};

const originsOf = (lens: LensInput): ConstantOrigin[] => [
  ...new Set(lens.constants.map(({ origin }) => origin)),
];
const formulasOf = (lens: LensInput): FormulaId[] => [
  ...new Set(lens.constants.map(({ formula }) => formula)),
];
const aConstantOf = (lens: LensInput, origin: ConstantOrigin): number => {
  const constant = lens.constants.find((one) => one.formula === 'srkt' && one.origin === origin);
  return (constant?.values as { aConstant: number }).aConstant;
};

describe('the lens catalogue of the demonstration', () => {
  it.each(lenses.map((lens) => [lens.name, lens] as const))('%s is a valid model', (_name, lens) => {
    expect(lensInputSchema.parse(lens)).toEqual(lens);
    expect(lens.remarks).toMatch(/^Invented model of the demonstration/);
    expect(new Set(lens.constants.map(({ source }) => source))).toEqual(
      new Set(['invented for the demonstration']),
    );
  });

  it('has every kind, plain and toric, and every design', () => {
    const kinds = new Set(lenses.map(({ kind, isToric }) => `${kind}/${isToric}`));

    expect(lenses.length).toBeGreaterThanOrEqual(10);
    expect(kinds).toEqual(new Set(LENS_KINDS.flatMap((kind) => [`${kind}/false`, `${kind}/true`])));
    expect(new Set(lenses.map(({ design }) => design))).toEqual(new Set(LENS_DESIGNS));
    expect(new Set(lenses.map(({ name }) => name)).size).toBe(lenses.length);
  });

  it('has high powers, minus powers, and coarse steps at an end', () => {
    const ranges = lenses.flatMap(({ powerRanges }) => powerRanges);

    expect(Math.max(...ranges.map(({ toD }) => toD))).toBe(40);
    expect(Math.min(...ranges.map(({ fromD }) => fromD))).toBe(-12);
    expect(lenses.some(({ powerRanges }) => new Set(powerRanges.map(({ stepD }) => stepD)).size > 1)).toBe(
      true,
    );
  });

  it('has models without ultrasound constants, without Haigis, and a retired one', () => {
    expect(lenses.some((lens) => originsOf(lens).join() === 'optical')).toBe(true);
    expect(lenses.some((lens) => !formulasOf(lens).includes('haigis'))).toBe(true);
    expect(lenses.filter(({ isRetired }) => isRetired)).toHaveLength(1);
  });

  it('offers the models that the plans name, both for optical and ultrasound measurements', () => {
    for (const name of [EVERYDAY_LENS, BACKUP_LENS]) {
      const lens = lenses.find((candidate) => candidate.name === name);
      expect(lens && originsOf(lens)).toEqual(['optical', 'ultrasound']);
      expect(lens?.isRetired).toBe(false);
    }
  });

  it('sets ultrasound A-constants 0.3 to 0.4 below the optical ones', () => {
    const both = lenses.filter((lens) => originsOf(lens).length === 2);

    expect(both.length).toBeGreaterThanOrEqual(8);
    for (const lens of both) {
      const lowerBy = aConstantOf(lens, 'optical') - aConstantOf(lens, 'ultrasound');
      expect(lowerBy).toBeGreaterThanOrEqual(0.3);
      expect(lowerBy).toBeLessThanOrEqual(0.4);
    }
  });

  it('gives an average eye the same power by every formula, to 0.2 D of their mean', () => {
    for (const lens of lenses.filter((one) => formulasOf(one).length === FORMULA_IDS.length)) {
      for (const origin of originsOf(lens)) {
        const powers = lens.constants
          .filter((constant) => constant.origin === origin)
          .map(({ formula, values }) => powerForRefraction(formula, AVERAGE_EYE, 0, values).powerD);
        const mean = powers.reduce((sum, power) => sum + power, 0) / powers.length;

        expect(powers).toHaveLength(5);
        for (const power of powers) expect(Math.abs(power - mean)).toBeLessThanOrEqual(0.2);
        expect(mean).toBeGreaterThan(18);
        expect(mean).toBeLessThan(23);
      }
    }
  });

  it('knows what the everyday lens said before its constants were corrected', () => {
    const now = lenses.find(({ name }) => name === EVERYDAY_LENS);

    expect(lensInputSchema.parse(everydayLensBefore()).name).toBe(EVERYDAY_LENS);
    expect(aConstantOf(everydayLensBefore(), 'optical')).toBe(118.8);
    expect(now && aConstantOf(now, 'optical')).toBe(118.9);
  });
});
