/** One lens model for one eye: who speaks, who is silent and why, the candidate powers and their landings. */
import { prepareLanding } from '@/formulas';
import type { FormulaId, PreparedLanding } from '@/formulas';
import type { Candidate, ModelCalculation, PlanInput } from '@/shared/contract';
import { powersAround } from './candidate-powers';
import { geometryFor } from './effective-eye';
import { listen, unlessRefused, type ModelQuestion, type Speaker } from './formula-answers';
import {
  disagreementNotices,
  formulaOptions,
  leadingNotices,
  rangeNotices,
  toricNotices,
} from './plan-notices';

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
  const landings = landingsOf(leader, question);
  const rows = powersD.flatMap((powerD) => {
    const row = unlessRefused(() => candidateAt(powerD, { speakers, landings, input }));
    // A power so far off that no refraction comes of it; only a choice made for another eye could be one.
    return row instanceof Error ? [] : [row];
  });
  const candidates = withClosest(rows, input.targetD);
  const closest = candidates.find(({ isClosest }) => isClosest);
  const asked = question.leading.find((formula) => input.formulas.includes(formula));
  return {
    ...base,
    leadingFormula: leader.formula,
    candidates,
    spreadParts: closest ? largestFirst(landings.at(closest.powerD).parts) : [],
    notices: [
      ...leadingNotices(asked, leader.formula),
      ...toricNotices(lens.isToric),
      ...rangeNotices(beyond, leader.exactPowerD),
      ...disagreementNotices(closest),
    ],
  };
}

function findLeader(speakers: readonly Speaker[], leading: readonly FormulaId[]): Speaker | undefined {
  const preferred = leading.map((formula) => speakers.find((speaker) => speaker.formula === formula));
  return preferred.find((speaker) => speaker !== undefined) ?? speakers[0];
}

function landingsOf(leader: Speaker, { used, spread, input }: ModelQuestion): PreparedLanding {
  return prepareLanding({
    formula: leader.formula,
    eye: geometryFor(leader.formula, used),
    constants: leader.constant.values,
    spread,
    options: formulaOptions(input),
  });
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

/** Far from the target every chance is nil: then the mean that lies nearer is the closer one. */
function withClosest(candidates: readonly Candidate[], targetD: number): Candidate[] {
  const offD = ({ landing }: Candidate): number => Math.abs(landing.meanD - targetD);
  const [best] = [...candidates].sort((a, b) => b.landing.chance - a.landing.chance || offD(a) - offD(b));
  return candidates.map((candidate) => ({ ...candidate, isClosest: candidate === best }));
}

const largestFirst = (parts: ModelCalculation['spreadParts']): ModelCalculation['spreadParts'] =>
  [...parts].sort((a, b) => b.sdD - a.sdD).map(({ source, sdD }) => ({ source, sdD }));
