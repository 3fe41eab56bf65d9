/** What the surgeon of the demonstration did: stops settled, plans drafted and signed through the real services. */
import { SIDES, type PlanDesk, type Side } from '@/shared/contract';
import type { Act } from '@/server/act';
import { settleFlag } from '@/server/features/eyes/eye-desk.service';
import { getEyes } from '@/server/features/eyes/eye-record.service';
import { listLenses } from '@/server/features/lenses/lens.service';
import { listMeasurements, ofRecord } from '@/server/features/measurements/measurement.service';
import { changePlan, signPlan, startDraft } from '@/server/features/plans/plan.service';
import { BACKUP_LENS, type DemoCase, type DemoPlan, type DemoSettlement } from './demo-case';
import { clinicMoment } from './demo-days';
import { getPatientByRecord, type SeedStep } from './seed-step';

export function settlementSteps(cases: readonly DemoCase[], today: string): SeedStep[] {
  return cases.flatMap(({ person, settled }) =>
    (settled ?? []).map((settlement) => ({
      at: clinicMoment(today, settlement.daysAgo, '11:00'),
      by: 'surgeon' as const,
      perform: (act: Act) => settle(act, person.record, settlement),
    })),
  );
}

async function settle(act: Act, record: string, { side, ruleId, because }: DemoSettlement): Promise<void> {
  const { id: patientId } = await getPatientByRecord(act, record);
  const { eye } = await getEyes(patientId, side, act.transaction);
  const current = ofRecord((await listMeasurements([eye], act.transaction)).get(eye.id));
  await settleFlag(act, { patientId, side }, { ruleId, measurementId: current?.id ?? null, reason: because });
}

export function planSteps(cases: readonly DemoCase[], today: string): SeedStep[] {
  return cases.flatMap(({ person, plan }, place) =>
    SIDES.flatMap((side, sidePlace) => {
      const wanted = plan?.[side];
      if (!wanted) return [];
      return [
        {
          at: clinicMoment(today, wanted.daysAgo, eveningTime(2 * place + sidePlace)),
          by: 'surgeon' as const,
          perform: (act: Act) => planEye(act, { record: person.record, side, wanted }),
        },
      ];
    }),
  );
}

/** Plans of one day are made one after the other. */
const eveningTime = (place: number): string => `17:${10 + (place % 50)}`;

interface EyeToPlan {
  record: string;
  side: Side;
  wanted: DemoPlan;
}

async function planEye(act: Act, { record, side, wanted }: EyeToPlan): Promise<void> {
  const { id: patientId } = await getPatientByRecord(act, record);
  const lensIds = await idsOfLenses(act, [...new Set([wanted.lensName, BACKUP_LENS])]);
  const draft = await startDraft(act, { patientId, side }, { lensIds, targetD: wanted.targetD });
  if (wanted.state === 'open') return;
  const chosen = await chooseClosest(act, draft);
  if (wanted.state === 'chosen') return;
  const weighed = chosen.calculation.flags.filter(({ severity }) => severity === 'weigh');
  await signPlan(act, chosen.plan.id, {
    version: chosen.plan.version,
    shownDigest: chosen.shownDigest,
    confirmedSide: side,
    acknowledgedRuleIds: weighed.map(({ ruleId }) => ruleId),
  });
}

async function idsOfLenses(act: Act, names: readonly string[]): Promise<string[]> {
  const lenses = await listLenses(act.transaction);
  return names.map((name) => {
    const lens = lenses.find((candidate) => candidate.name === name);
    if (!lens) throw new Error(`${name} is not in the catalogue`);
    return lens.id;
  });
}

/** The power with the best chance, of the first model. */
async function chooseClosest(act: Act, { plan, calculation }: PlanDesk): Promise<PlanDesk> {
  const model = calculation.models[0];
  const closest = model?.candidates.find(({ isClosest }) => isClosest);
  if (!model || !closest) throw new Error(`No formula gives a power for plan ${plan.id}`);
  const choice = { lensId: model.lensId, powerD: closest.powerD };
  return changePlan(act, plan.id, { ifMatch: plan.version, change: { ...plan.input, choice } });
}
