/** One lens model for one eye: who speaks, who is silent and why, the candidate powers and their landings. */
import { defaultSpread, prepareFormula, prepareLanding } from '@/formulas';
import type { FormulaId, PreparedLanding } from '@/formulas';
import type {
  Candidate,
  EyeHistory,
  Lens,
  LensConstant,
  MeasurementValues,
  ModelCalculation,
  PlanInput,
  Silenced,
} from '@/shared/contract';
import { powersAround } from './candidate-powers';
import { toGeometry } from './effective-eye';
import type { UsedEye } from './effective-eye';
import { disagreementNotices, formulaOptions, rangeNotices } from './plan-notices';
import { constantFor, silencedByDepth, silencedByHistory } from './silencing';

export interface ModelQuestion {
  lens: Lens;
  used: UsedEye;
  values: MeasurementValues;
  history: EyeHistory;
  input: PlanInput;
  /** Formulas in the order in which they would lead. */
  leading: readonly FormulaId[];
  /** The power chosen for this model, if any. */
  chosenPowerD: number | null;
}

type Prepared = ReturnType<typeof prepareFormula>;
interface Speaker {
  formula: FormulaId;
  constant: LensConstant;
  prepared: Prepared;
  exactPowerD: number;
}

export function calculateModel(question: ModelQuestion): ModelCalculation {
  const { lens, input } = question;
  const { speakers, silenced } = listen(question);
  const leader = findLeader(speakers, question.leading);
  const base = {
    lensId: lens.id,
    lensName: lens.name,
    constants: speakers.map(({ constant }) => constant),
    silenced,
    exactPowers: speakers.map(({ formula, exactPowerD, prepared }) => ({
      formula,
      powerD: exactPowerD,
      elpMm: prepared.elpMm,
    })),
  };
  if (!leader) return { ...base, leadingFormula: null, candidates: [], spreadParts: [], notices: [] };
  const { powersD, beyond } = powersAround({
    exactPowerD: leader.exactPowerD,
    ranges: lens.powerRanges,
    chosenPowerD: question.chosenPowerD,
  });
  const landings = prepareLanding({
    formula: leader.formula,
    eye: toGeometry(question.used),
    constants: leader.constant.values,
    spread: spreadOf(question),
    options: formulaOptions(input),
  });
  const candidates = withClosest(powersD.map((powerD) => candidateAt(powerD, { speakers, landings, input })));
  const closest = candidates.find(({ isClosest }) => isClosest);
  return {
    ...base,
    leadingFormula: leader.formula,
    candidates,
    spreadParts: closest ? largestFirst(landings.at(closest.powerD).parts) : [],
    notices: [...rangeNotices(beyond, leader.exactPowerD), ...disagreementNotices(closest)],
  };
}

/** Asks each formula of the plan; one that cannot answer says why. */
function listen(question: ModelQuestion): { speakers: Speaker[]; silenced: Silenced[] } {
  const speakers: Speaker[] = [];
  const silenced: Silenced[] = [];
  for (const formula of question.input.formulas) {
    const answer = ask(formula, question);
    if ('reason' in answer) silenced.push({ formula, ...answer });
    else speakers.push({ formula, ...answer });
  }
  return { speakers, silenced };
}

function ask(
  formula: FormulaId,
  { lens, used, values, history, input }: ModelQuestion,
): Omit<Speaker, 'formula'> | Omit<Silenced, 'formula'> {
  const silent = silencedByHistory(history) ?? silencedByDepth(formula, used, values);
  if (silent) return silent;
  const constant = constantFor(lens, formula, used.method);
  if ('reason' in constant) return constant;
  try {
    const prepared = prepareFormula(formula, toGeometry(used), constant.values, formulaOptions(input));
    return { constant, prepared, exactPowerD: prepared.powerAt(input.targetD) };
  } catch (error) {
    // The core refuses by typed errors whose words name the input and its limit.
    return {
      code: error instanceof Error ? error.name : 'refused',
      reason: error instanceof Error ? error.message : 'no result',
    };
  }
}

function findLeader(speakers: readonly Speaker[], leading: readonly FormulaId[]): Speaker | undefined {
  const preferred = leading.map((formula) => speakers.find((speaker) => speaker.formula === formula));
  return preferred.find((speaker) => speaker !== undefined) ?? speakers[0];
}

interface CandidateContext {
  speakers: readonly Speaker[];
  landings: PreparedLanding;
  input: PlanInput;
}

function candidateAt(powerD: number, { speakers, landings, input }: CandidateContext): Candidate {
  const predictions = speakers.map(({ formula, prepared }) => ({
    formula,
    refractionD: prepared.refractionAt(powerD),
    elpMm: prepared.elpMm,
    notices: [...prepared.notices],
  }));
  const refractions = predictions.map(({ refractionD }) => refractionD);
  const landing = landings.at(powerD);
  return {
    powerD,
    predictions,
    lowestD: Math.min(...refractions),
    highestD: Math.max(...refractions),
    landing: {
      meanD: landing.meanD,
      sdD: landing.sdD,
      chance: landing.chanceWithin(input.targetD, input.toleranceD),
    },
    isClosest: false,
  };
}

function withClosest(candidates: readonly Candidate[]): Candidate[] {
  const best = Math.max(...candidates.map(({ landing }) => landing.chance));
  const closest = candidates.findIndex(({ landing }) => landing.chance === best);
  return candidates.map((candidate, index) => ({ ...candidate, isClosest: index === closest }));
}

/** An eye measured by ultrasound is one that optics could not read: its published errors are wider. */
function spreadOf({ used }: ModelQuestion): ReturnType<typeof defaultSpread> {
  return defaultSpread(used.method, { hasOpticalFailed: used.method !== 'optical' });
}

const largestFirst = (parts: ModelCalculation['spreadParts']): ModelCalculation['spreadParts'] =>
  [...parts].sort((a, b) => b.sdD - a.sdD).map(({ source, sdD }) => ({ source, sdD }));
