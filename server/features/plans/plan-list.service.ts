/** Lists of plans, each line saying in plain words what was chosen and whether it still stands. */
import { z } from 'zod';
import { formatPatientName, hasPermission, type Page, type Plan, type PlanListItem } from '@/shared/contract';
import type { Act, Actor } from '@/server/act';
import { listEyesOfPatients } from '@/server/features/eyes/eye-record.service';
import { findPatientIds } from '@/server/features/patients/patient-record.service';
import { decodeCursor, toPage } from '@/server/http/paging';
import { plainWords } from './plain-words';
import { reasonsOf } from './plan-desk';
import { factsOfEye, factsOfEyes, type EyeFacts } from './plan-facts.service';
import { listPlansAfter, listPlansOfEye, type StoredPlan } from './plan.repository';
import { readFrozen } from './signed-snapshot';

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
  const eyeIds = query.search ? await eyesOf(query.search) : undefined;
  const page = await toPage({
    limit: query.limit,
    fetch: (count) => listPlansAfter({ statuses: allowed, eyeIds, after: afterId, count }),
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

/** A signed plan is told from what was frozen, a draft from what is known now. */
function toldFrom(plan: StoredPlan, facts: EyeFacts) {
  if (plan.snapshot === null) return { patient: facts.patient, lenses: facts.lenses, chance: null };
  const { patient, lenses, chosenCandidate } = readFrozen(plan);
  return { patient, lenses, chance: chosenCandidate.landing.chance };
}

function toItem(plan: StoredPlan, facts: EyeFacts): PlanListItem {
  const { patient, lenses, chance } = toldFrom(plan, facts);
  const { id, sequence, status, choice, input, signedBy, signedAt } = plan;
  const lens = lenses.find((candidate) => candidate.id === choice?.lensId);
  return {
    id,
    patientId: facts.patient.id,
    patientName: formatPatientName(patient),
    recordNumber: patient.recordNumber,
    birthDate: patient.birthDate,
    side: facts.eye.side,
    sequence,
    status,
    lensName: lens?.name ?? null,
    powerD: choice?.powerD ?? null,
    targetD: input.targetD,
    chance,
    toleranceD: input.toleranceD,
    plainWords: plainWords({ choice, lens, targetD: input.targetD }),
    signedBy,
    signedAt,
    outOfDateReasons: reasonsOf(plan, facts),
  };
}

async function eyesOf(search: string): Promise<string[]> {
  const eyes = await listEyesOfPatients(await findPatientIds(search));
  return eyes.map(({ id }) => id);
}
