/** What is known about each formula, for the method page and for wherever a result is shown. */
import { haigisFacts } from './third-generation/haigis';
import { hofferQFacts } from './third-generation/hoffer-q';
import { holladay1Facts } from './third-generation/holladay1';
import { srktFacts } from './third-generation/srkt';
import { t2Facts } from './third-generation/t2';
import type { FormulaFacts } from './facts-types';
import type { FormulaId } from './types';

export const formulaFacts: Record<FormulaId, FormulaFacts> = {
  srkt: srktFacts,
  t2: t2Facts,
  holladay1: holladay1Facts,
  hofferQ: hofferQFacts,
  haigis: haigisFacts,
};
