/** Lists of plans, each line saying in plain words what was chosen and whether it still stands. */
import { z } from 'zod';
import { formatPatientName, hasPermission, type Page, type Plan, type PlanListItem } from '@/shared/contract';
import type { Act, Actor } from '@/server/act';
import { findPatientIds } from '@/server/features/patients/patient-record.service';
import { decodeCursor, toPage } from '@/server/http/paging';
import { plainWords, type ChoiceInWords } from './plain-words';
import { reasonsOf } from './plan-desk';
import { factsOfEye, factsOfEyes, type EyeFacts } from './plan-facts.service';
import { listPlansAfter, listPlansOfEye, type StoredPlan } from './plan.repository';
import { findFrozen, MISMATCH } from './signed-snapshot';

export interface PlanListQuery {
  status?: Plan['status'];
  search?: string;
  limit?: number;
  after?: string;
}

const READABLE: readonly Plan['status'][] = ['signed', 'replaced'];

export async function listPlans(
  actor: Pick<Actor, 'roles'>,
  at: string,
  query: PlanListQuery,
): Promise<Page<PlanListItem>> {
  const afterId = decodeCursor(query.after, z.tuple([z.string(), z.string()]));
  const statuses = query.status ? [query.status] : READABLE;
  const allowed = hasPermission(actor.roles, 'plan.write')
    ? statuses
    : statuses.filter((status) => READABLE.includes(status));
  const patientIds = query.search ? await findPatientIds(query.search) : undefined;
  const page = await toPage({
    limit: query.limit,
    fetch: (count) => listPlansAfter({ statuses: allowed, patientIds, after: afterId, count }),
    toItem: (plan) => plan,
    cursorOf: ({ actedAt, id }) => [actedAt, id],
  });
  return { ...page, items: await withWords(page.items, at) };
}

/** Plans of one eye, newest first; discarded ones are in the audit trail only, drafts for who may see them. */
export async function listOfEye(
  act: Pick<Act, 'actor' | 'at' | 'transaction'>,
  eyeId: string,
): Promise<PlanListItem[]> {
  const maySeeDrafts = hasPermission(act.actor.roles, 'plan.write');
  const stored = await listPlansOfEye(eyeId, act.transaction);
  const shown = stored.filter(
    ({ status }) => READABLE.includes(status) || (status === 'draft' && maySeeDrafts),
  );
  if (shown.length === 0) return [];
  const facts = await factsOfEye(eyeId, act.at, act.transaction);
  return shown.map((plan) => toItem(plan, facts));
}

async function withWords(plans: readonly StoredPlan[], at: string): Promise<PlanListItem[]> {
  const facts = await factsOfEyes([...new Set(plans.map(({ eyeId }) => eyeId))], at);
  return plans.flatMap((plan) => {
    const ofEye = facts.get(plan.eyeId);
    return ofEye ? [toItem(plan, ofEye)] : [];
  });
}

/** Under the name of today, so that it is found; what was chosen and how sure it was, as it was signed. */
function toItem(plan: StoredPlan, facts: EyeFacts): PlanListItem {
  const { patient, eye } = facts;
  const { id, sequence, status, input, signedBy, signedAt } = plan;
  return {
    id,
    patientId: patient.id,
    patientName: formatPatientName(patient),
    recordNumber: patient.recordNumber,
    birthDate: patient.birthDate,
    side: eye.side,
    sequence,
    status,
    targetD: input.targetD,
    toleranceD: input.toleranceD,
    ...choiceOf(plan, facts),
    signedBy,
    signedAt,
    outOfDateReasons: reasonsOf(plan, facts),
  };
}

type Chosen = Pick<PlanListItem, 'lensName' | 'powerD' | 'chance' | 'plainWords'>;

const WITHHELD: Chosen = { lensName: null, powerD: null, chance: null, plainWords: MISMATCH };

function choiceOf(plan: StoredPlan, { eye, lenses }: EyeFacts): Chosen {
  const { choice, input, snapshot } = plan;
  if (snapshot === null) {
    const lens = lenses.find(({ id }) => id === choice?.lensId);
    return inWords({ side: eye.side, choice, lens, targetD: input.targetD }, null);
  }
  const frozen = findFrozen(plan);
  if (!frozen) return WITHHELD;
  const lens = frozen.lenses.find(({ id }) => id === frozen.choice.lensId);
  const words = { side: eye.side, choice: frozen.choice, lens, targetD: frozen.input.targetD };
  return inWords(words, frozen.chosenCandidate.landing.chance);
}

const inWords = (words: ChoiceInWords, chance: number | null): Chosen => ({
  lensName: words.lens?.name ?? null,
  powerD: words.choice?.powerD ?? null,
  chance,
  plainWords: plainWords(words),
});
