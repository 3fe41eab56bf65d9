/**
 * Proposal — all that a surgeon sees before a personalised constant is taken up, from one list of cases.
 *
 * Inputs: formula, cases of one origin, that origin, the constants in force; seed for the folds, 1 when absent.
 * Result: gate; constant of zero mean error; the same drawn to the published one, which is the constant proposed; its
 *   effect out of sample, from 20 patients on; cases missing to 0.10 D; cases to review; errors by axial length.
 * Outside the valid range: what the parts throw.
 * Source: the gates and rules named in their own files; common practice [CP].
 * Erratum / variant: nothing is adopted here: that is a person's signature.
 */
import { groupByAxialLength } from './axial-length-groups';
import { casesNeeded } from './cases-needed';
import { errorAt, prepareCohort } from './cohort';
import { expectedErrorSdD, pooledSdD } from './expected-error';
import { gateCases, gateOf } from './gates';
import { outOfSampleEffect } from './out-of-sample';
import { casesToReview } from './review';
import { shrinkToPublished } from './shrinkage';
import { zeroCohort } from './zero-mean-error';
import type { AxialLengthGroup } from './axial-length-groups';
import type { CasesNeeded } from './cases-needed';
import type { CohortQuestion } from './cohort';
import type { Gate } from './gates';
import type { OutOfSampleEffect } from './out-of-sample';
import type { CaseToReview } from './review';
import type { ShrinkageOptions, ShrunkConstant } from './shrinkage';
import type { ZeroedConstant } from './zero-mean-error';

export interface ProposalQuestion extends CohortQuestion, ShrinkageOptions {
  seed?: number;
}

export interface ConstantProposal {
  gate: Gate;
  zeroed: ZeroedConstant;
  /** The constant proposed. */
  shrunk: ShrunkConstant;
  /** Null below 20 patients: too few to be parted into folds. */
  outOfSample: OutOfSampleEffect | null;
  untilTenth: CasesNeeded;
  toReview: CaseToReview[];
  /** With the constant proposed. */
  byAxialLength: AxialLengthGroup[];
}

export function proposeConstant(question: ProposalQuestion): ConstantProposal {
  const cohort = prepareCohort(question);
  const expectedSdD = question.expectedSdD ?? expectedErrorSdD[cohort.origin];
  const { eyes } = cohort;
  const zeroed = zeroCohort(cohort);
  const shrunk = shrinkToPublished(zeroed, question);
  const errorsBeforeD = eyes.map((eye) => errorAt(cohort, eye, cohort.publishedValue));
  return {
    gate: gateOf(eyes.length),
    zeroed,
    shrunk,
    outOfSample: zeroed.patientCount < gateCases.provisional ? null : outOfSampleEffect(question),
    untilTenth: casesNeeded({
      sdD: pooledSdD({ ownSdD: zeroed.sdD, caseCount: eyes.length, expectedSdD }),
      caseCount: eyes.length,
      designEffect: zeroed.designEffect,
    }),
    toReview: casesToReview(errorsBeforeD),
    byAxialLength: groupByAxialLength({
      errorsD: eyes.map((eye) => errorAt(cohort, eye, shrunk.value)),
      axialLengthsMm: eyes.map(({ axialLengthMm }) => axialLengthMm),
      clusters: eyes.map(({ cluster }) => cluster),
    }),
  };
}
