/** Beside R's weighted lm with the cluster sandwich of its package sandwich. */
import { DegenerateDataError, TooFewValuesError } from '@/formulas';
import { fitTwoRegressors } from '@/formulas/statistics/two-regressor-fit';
import reference from '../reference/statistics.json';

const { triple, patient } = reference;
const rows = triple.acd.map((acd, index) => ({
  first: acd,
  second: triple.al[index]!,
  explained: triple.plane[index]!,
  weight: triple.weights[index]!,
  cluster: patient[index]!,
}));

describe('the fit by two measurements', () => {
  it('agrees with R', () => {
    const fit = fitTwoRegressors(rows);

    expect(fit.firstSlope).toBeCloseTo(triple.acdSlope, 12);
    expect(fit.secondSlope).toBeCloseTo(triple.alSlope, 12);
    expect(fit.firstStandardError).toBeCloseTo(triple.acdError, 12);
    expect(fit.secondStandardError).toBeCloseTo(triple.alError, 12);
  });

  it('passes through the weighted means', () => {
    const { intercept, firstSlope, secondSlope } = fitTwoRegressors(rows);
    const residuals = rows.map(
      ({ first, second, explained, weight }) =>
        weight * (explained - intercept - firstSlope * first - secondSlope * second),
    );

    expect(residuals.reduce((sum, residual) => sum + residual, 0)).toBeCloseTo(0, 10);
  });

  it('refuses too few rows and measurements that move together', () => {
    expect(() => fitTwoRegressors(rows.slice(0, 4))).toThrow(TooFewValuesError);
    expect(() => fitTwoRegressors(rows.map((row) => ({ ...row, cluster: 1 })))).toThrow(/patients/);
    expect(() => fitTwoRegressors(rows.map((row) => ({ ...row, second: 2 * row.first })))).toThrow(
      DegenerateDataError,
    );
    expect(() => fitTwoRegressors(rows.map((row) => ({ ...row, first: 3 })))).toThrow(DegenerateDataError);
    expect(() => fitTwoRegressors(rows.map((row) => ({ ...row, weight: 0 })))).toThrow(/weight/);
  });
});
