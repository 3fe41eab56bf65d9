/** Drafting and signing the plan of one eye. */
import {
  hasPermission,
  type NewPlan,
  type PlanChange,
  type PlanDesk,
  type PlanInput,
  type Side,
  type SignPlan,
} from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit, type AuditNote } from '@/server/audit/writer';
import { recordView, type ViewDeps, type Viewer } from '@/server/audit/view-writer';
import { getEyes } from '@/server/features/eyes/eye-record.service';
import { getPractice } from '@/server/features/practice/practice.service';
import { requireVersion } from '@/server/http/etag';
import { invalidField, ProblemError } from '@/server/http/problem';
import { draftInput } from './draft-defaults';
import { deskOf } from './plan-desk';
import { factsOfEye, type EyeFacts } from './plan-facts.service';
import {
  addDraft,
  changeDraft,
  discardDraft,
  findPlan,
  listPlansOfEye,
  storeSignature,
  type StoredPlan,
} from './plan.repository';
import { freeze, readFrozen } from './signed-snapshot';

interface Found {
  stored: StoredPlan;
  facts: EyeFacts;
  desk: PlanDesk;
}

/** A new draft; an eye that has one already keeps that, so that two people do not plan side by side. */
export async function startDraft(
  act: Act,
  { patientId, side }: { patientId: string; side: Side },
  given: NewPlan,
): Promise<PlanDesk> {
  const { eye } = await getEyes(patientId, side, act.transaction);
  const open = (await listPlansOfEye(eye.id, act.transaction)).find(({ status }) => status === 'draft');
  if (open) return (await findOpen(act, open.id)).desk;
  const facts = await factsOfEye(eye.id, act.at, act.transaction);
  const input = draftInput(given, facts.measurements, facts.lenses);
  checkInput(input, facts);
  const id = act.newId();
  await addDraft({ id, eyeId: eye.id, input, createdBy: act.actor.id, at: act.at }, act.transaction);
  await audit(act, 'plan.create', { id, facts, version: 0, detail: { input } });
  return (await findOpen(act, id)).desk;
}

/** Reading a plan; drafts are the surgeon's alone. Nothing is answered before the view is in the trail. */
export async function viewPlan(deps: ViewDeps, viewer: Viewer, id: string): Promise<PlanDesk> {
  const { stored, facts, desk } = await findOpen({ actor: viewer.actor, at: nowOf(deps) }, id);
  const detail = { sequence: stored.sequence, status: stored.status };
  await recordView(deps, viewer, noteOf('plan.view', { id, facts, version: stored.version, detail }));
  return desk;
}

export async function changePlan(
  act: Act,
  id: string,
  { ifMatch, change }: { ifMatch: number; change: PlanChange },
): Promise<PlanDesk> {
  const { stored, facts, desk } = await findDraft(act, id);
  requireVersion(ifMatch, stored.version, desk);
  const { choice, ...input } = change;
  checkInput(input, facts);
  const changed = { ...stored, input, choice };
  if (choice && !hasCandidate(deskOf(changed, facts), choice)) {
    throw invalidField('choice', 'No formula gives a result for this lens and power');
  }
  await changeDraft(id, { input, choice, at: act.at }, act.transaction);
  const before = { input: stored.input, choice: stored.choice };
  await audit(act, 'plan.change', {
    id,
    facts,
    version: stored.version + 1,
    detail: { before, after: { input, choice } },
  });
  return (await findOpen(act, id)).desk;
}

export async function discardPlan(act: Act, id: string): Promise<PlanDesk> {
  const { stored, facts } = await findDraft(act, id);
  await discardDraft(id, act.at, act.transaction);
  await audit(act, 'plan.discard', {
    id,
    facts,
    version: stored.version + 1,
    detail: { sequence: stored.sequence },
  });
  return (await findOpen(act, id)).desk;
}

/** Freezes the draft. The password was checked before; everything else is checked here, in the transaction. */
export async function signPlan(
  act: Act,
  id: string,
  signature: Omit<SignPlan, 'password'>,
): Promise<PlanDesk> {
  const { stored, facts, desk } = await findDraft(act, id);
  requireVersion(signature.version, stored.version, desk);
  if (signature.shownDigest !== desk.shownDigest)
    throw new ProblemError('changed-meanwhile', CHANGED_SINCE_SHOWN, { current: desk });
  checkSignature(desk, signature);
  const frozen = freeze(await snapshotOf(act, desk, signature.acknowledgedRuleIds));
  await storeSignature(
    id,
    { signedBy: act.actor.id, at: act.at, snapshot: frozen.text, digest: frozen.digest },
    act.transaction,
  );
  const detail = {
    digest: frozen.digest,
    sequence: stored.sequence,
    choice: stored.choice,
    acknowledged: signature.acknowledgedRuleIds,
  };
  await audit(act, 'plan.sign', { id, facts, version: stored.version + 1, detail });
  return (await findOpen(act, id)).desk;
}

/** What the sheet prints; asking for it is noted. */
export async function viewForPrint(deps: ViewDeps, viewer: Viewer, id: string) {
  const { stored, facts, desk } = await findOpen({ actor: viewer.actor, at: nowOf(deps) }, id);
  if (stored.snapshot === null) throw new ProblemError('conflict', 'Only a signed plan has a sheet');
  const { sequence, digest } = stored;
  const detail = { sequence, digest, reasons: desk.plan.outOfDateReasons };
  await recordView(deps, viewer, noteOf('plan.print', { id, facts, version: stored.version, detail }));
  return { snapshot: readFrozen(stored), digest: digest ?? '', plan: desk.plan };
}

/** Somebody reads, inside an act or outside of one. */
interface Reading {
  actor: Pick<Act['actor'], 'roles'>;
  at: string;
  transaction?: Act['transaction'];
}

const nowOf = ({ clock }: ViewDeps): string => clock.now().toISOString();

async function findOpen({ actor, at, transaction }: Reading, id: string): Promise<Found> {
  const stored = await findPlan(id, transaction);
  const maySeeDrafts = hasPermission(actor.roles, 'plan.write');
  if (!stored || (stored.snapshot === null && !maySeeDrafts)) throw new ProblemError('not-found');
  const facts = await factsOfEye(stored.eyeId, at, transaction);
  return { stored, facts, desk: deskOf(stored, facts) };
}

async function findDraft(act: Act, id: string): Promise<Found> {
  const found = await findOpen(act, id);
  if (found.stored.status !== 'draft')
    throw new ProblemError('conflict', 'Only a draft can be changed: start a new plan for this eye');
  return found;
}

/** Everything named must be of this eye and this catalogue. */
function checkInput(input: PlanInput, { measurements, lenses }: EyeFacts): void {
  const measurement = measurements.find(({ id }) => id === input.measurementId);
  if (!measurement) throw invalidField('measurementId', 'This measurement is not one of this eye');
  if (measurement.supersededById)
    throw invalidField('measurementId', 'This measurement was superseded: take the one of record');
  input.lensIds.forEach((id, index) => {
    if (!lenses.some((lens) => lens.id === id))
      throw invalidField(`lensIds.${index}`, 'This lens model is not in the catalogue');
  });
  if (new Set(input.lensIds).size !== input.lensIds.length)
    throw invalidField('lensIds', 'The same lens model twice');
  if (input.leadingFormula && !input.formulas.includes(input.leadingFormula)) {
    throw invalidField('leadingFormula', 'The leading formula is not among the chosen ones');
  }
}

function hasCandidate(
  { calculation }: PlanDesk,
  { lensId, powerD }: { lensId: string; powerD: number },
): boolean {
  const model = calculation.models.find((candidate) => candidate.lensId === lensId);
  return model?.candidates.some((candidate) => candidate.powerD === powerD) ?? false;
}

function checkSignature(
  { plan, blockers, calculation }: PlanDesk,
  { confirmedSide, acknowledgedRuleIds }: Omit<SignPlan, 'password'>,
): void {
  if (confirmedSide !== plan.side) {
    throw invalidField('confirmedSide', `This plan is for the ${plan.side} eye, not the ${confirmedSide}`);
  }
  if (blockers.length > 0) throw new ProblemError('conflict', blockers.join('. '));
  const unread = calculation.flags.filter(
    ({ severity, ruleId }) => severity === 'weigh' && !acknowledgedRuleIds.includes(ruleId),
  );
  if (unread.length > 0) {
    throw invalidField(
      'acknowledgedRuleIds',
      `Still to weigh: ${unread.map(({ message }) => message).join('; ')}`,
    );
  }
}

const CHANGED_SINCE_SHOWN =
  'The patient, the eye, the constants or the flags changed since this plan was shown: look at it again before you sign';

async function snapshotOf(
  act: Act,
  { plan, patient, eye, measurement, lenses, calculation }: PlanDesk,
  acknowledgedRuleIds: readonly string[],
) {
  const { choice, input } = plan;
  const model = calculation.models.find(({ lensId }) => lensId === choice?.lensId);
  const chosenCandidate = model?.candidates.find(({ powerD }) => powerD === choice?.powerD);
  if (!choice || !model || !chosenCandidate)
    throw new ProblemError('conflict', 'Choose a lens and its power');
  return {
    schema: 1 as const,
    planId: plan.id,
    sequence: plan.sequence,
    practiceName: (await getPractice(act.transaction)).name,
    patient,
    eye,
    measurement,
    input,
    lenses: lenses.filter(({ id }) => input.lensIds.includes(id)),
    calculation,
    choice,
    chosenLensName: model.lensName,
    chosenCandidate,
    acknowledgedRuleIds: calculation.flags
      .filter(({ severity, ruleId }) => severity === 'weigh' && acknowledgedRuleIds.includes(ruleId))
      .map(({ ruleId }) => ruleId),
    signedBy: { id: act.actor.id, displayName: act.actor.displayName },
    signedAt: act.at,
  };
}

interface AuditFacts {
  id: string;
  facts: EyeFacts;
  version: number;
  detail: Record<string, unknown>;
}

function noteOf(action: string, { id, facts, version, detail }: AuditFacts): AuditNote {
  const { patient, eye } = facts;
  const about = { noun: 'plan', nounId: id, patientId: patient.id, version };
  return { action, ...about, detail: { side: eye.side, ...detail } };
}

const audit = (act: Act, action: string, facts: AuditFacts): Promise<void> =>
  recordAudit(act, noteOf(action, facts));
