/** What is known about the solvers, for the method page. */
import type { MethodFacts } from '../method-facts';

export const solverFacts: readonly MethodFacts[] = [
  {
    id: 'solvers/root',
    name: 'Bracketed root',
    equations: [{ text: 'inverse quadratic step where ξ and φ allow it, else the middle', mark: 'M' }],
    sources: [
      {
        citation:
          'Chandrupatla, A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function without using derivatives, Adv Eng Softw 1997;28:145-149',
        mark: 'M',
      },
    ],
    validRange: 'A continuous function with different signs at both ends.',
    checks: ['Known roots', 'Any increasing cubic', 'Divergence: no sign change, limit of steps, no number'],
    notKnown: [],
  },
  {
    id: 'solvers/bracket',
    name: 'Widening bracket',
    equations: [{ text: 'start ± step, ± 2 step, ± 4 step … until the sign changes', mark: 'D' }],
    sources: [{ citation: 'the step is doubled on both sides until the sign changes', mark: 'D' }],
    validRange: 'Within its limits.',
    checks: ['Roots near, far, at and beyond the limits'],
    notKnown: [],
  },
  {
    id: 'solvers/random',
    name: 'Seeded random numbers',
    equations: [{ text: 'xoshiro128**; normal deviates by the polar method', mark: 'N' }],
    sources: [
      { citation: 'Blackman, Vigna, ACM Trans Math Softw 2021;47(4):36', mark: 'N' },
      { citation: 'Marsaglia, Bray, SIAM Rev 1964;6:260-264', mark: 'M' },
    ],
    validRange: 'Whole seeds. Not for secrets.',
    checks: ["Ten numbers of the authors' reference program (read)", 'Chi-square of bins', 'Normal moments'],
    notKnown: [],
  },
];
