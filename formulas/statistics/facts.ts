/** What is known about each statistic, for the method page. */
import { comparingFacts } from './facts-comparing';
import { describingFacts } from './facts-describing';
import type { MethodFacts } from '../method-facts';

export const statisticsFacts: readonly MethodFacts[] = [...describingFacts, ...comparingFacts];
