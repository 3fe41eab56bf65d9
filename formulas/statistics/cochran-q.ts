/**
 * Cochran's Q — whether several formulas bring different shares of the same eyes within a band.
 *
 * Inputs: one row per eye, one column per formula: within the band or not; at least two formulas.
 * Result: Q, degrees of freedom (formulas - 1) and p by chi-square.
 * Outside the valid range: throws TooFewValuesError without rows or with one formula, UnequalLengthsError for rows of
 *   different lengths. Where no eye differs between formulas, Q is 0 and p is 1.
 * Source: Cochran, Biometrika 1950;37:256-266 [V formula, in an encyclopaedia].
 * Erratum / variant: approximate for few eyes that differ; McNemar's exact test follows pair by pair. Eyes count as
 *   independent: one eye per patient.
 */
import { TooFewValuesError } from './errors';
import { checkPairs } from './checks';
import { chiSquareUpperTail } from './f-and-chi-square';

export interface CochranResult {
  statistic: number;
  degreesOfFreedom: number;
  pValue: number;
}

export function cochranQ(rows: readonly (readonly boolean[])[]): CochranResult {
  const firstRow = rows[0];
  if (firstRow === undefined) throw new TooFewValuesError('Cochran Q: eyes', 0, 1);
  const formulas = firstRow.length; // k
  if (formulas < 2) throw new TooFewValuesError('Cochran Q: formulas', formulas, 2);
  const columns = new Array<number>(formulas).fill(0);
  let [total, squaredRows] = [0, 0]; // N and the sum of squared row totals
  for (const row of rows) {
    checkPairs('Cochran Q', firstRow, row);
    let inRow = 0;
    row.forEach((isWithin, column) => {
      if (!isWithin) return;
      inRow += 1;
      columns[column] = (columns[column] ?? 0) + 1;
    });
    total += inRow;
    squaredRows += inRow * inRow;
  }
  const degreesOfFreedom = formulas - 1;
  const scatter = formulas * total - squaredRows;
  if (scatter === 0) return { statistic: 0, degreesOfFreedom, pValue: 1 };
  const squaredColumns = columns.reduce((sum, column) => sum + column * column, 0);
  const statistic = (degreesOfFreedom * (formulas * squaredColumns - total * total)) / scatter;
  return { statistic, degreesOfFreedom, pValue: chiSquareUpperTail(statistic, degreesOfFreedom) };
}
