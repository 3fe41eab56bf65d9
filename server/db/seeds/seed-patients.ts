/** What the technician of the demonstration did: files stored, histories asked, people registered, eyes measured again. */
import { SIDES, type EyeHistory, type Side } from '@/shared/contract';
import type { Act } from '@/server/act';
import type { Deps } from '@/server/deps';
import { addMeasurement } from '@/server/features/eyes/eye-desk.service';
import { getEyes, recordHistory } from '@/server/features/eyes/eye-record.service';
import { sha256Of, storeFileAtOnce } from '@/server/features/imports/import.service';
import { listMeasurements, ofRecord } from '@/server/features/measurements/measurement.service';
import { registerPatient } from '@/server/features/patients/patient.service';
import { biometryCsv } from './demo-biometry';
import type { DemoCase, DemoRemeasurement } from './demo-case';
import { clinicDay, clinicMoment } from './demo-days';
import { templateRow, typedMeasurement, USUAL_DAYS_AGO, type DemoEye, type TemplateRow } from './demo-eye';
import { NOT_MEASURED_YET } from './demo-unmeasured';
import { getPatientByRecord, type SeedStep } from './seed-step';

const UNREMARKABLE: EyeHistory = {
  cornealSurgery: 'no',
  cornealSurgeryKind: null,
  lensStatus: 'phakic',
  vitreousStatus: 'vitreous',
  remarks: '',
};

const daysAgoOf = ({ daysAgo }: DemoEye): number => daysAgo ?? USUAL_DAYS_AGO;

/** One file for each day on which somebody was measured. */
export function fileSteps(deps: Deps, cases: readonly DemoCase[], today: string): SeedStep[] {
  const rowsByDay = new Map<number, TemplateRow[]>();
  for (const { person, ...one } of cases) {
    for (const { side, eye } of measuredIntoFiles(one)) {
      const rows = rowsByDay.get(daysAgoOf(eye)) ?? [];
      rowsByDay.set(daysAgoOf(eye), [...rows, templateRow(person, side, { eye, today })]);
    }
  }
  return [...rowsByDay].map(([daysAgo, rows]) => {
    const bytes = biometryCsv(rows);
    const file = { name: `biometry-${clinicDay(today, daysAgo)}.csv`, bytes, sha256: sha256Of(bytes) };
    return {
      at: clinicMoment(today, daysAgo, '16:05'),
      by: 'technician',
      perform: (act) => storeFileAtOnce(deps, act, file),
    };
  });
}

function measuredIntoFiles({ right, left, again }: Omit<DemoCase, 'person'>): { side: Side; eye: DemoEye }[] {
  return [
    ...(right ? [{ side: 'right' as const, eye: right }] : []),
    ...(left ? [{ side: 'left' as const, eye: left }] : []),
    ...(again ?? []).filter(({ because }) => because === undefined),
  ];
}

/** The answers of each patient, on the day of the first measurement. */
export function historySteps(cases: readonly DemoCase[], today: string): SeedStep[] {
  return cases.map(({ person, right, left, history }) => {
    const first = Math.max(...[right, left].flatMap((eye) => (eye ? [daysAgoOf(eye)] : [])));
    return {
      at: clinicMoment(today, first, '16:20'),
      by: 'technician',
      async perform(act) {
        const { id } = await getPatientByRecord(act, person.record);
        for (const side of SIDES) await recordAnswers(act, { patientId: id, side }, history?.[side]);
      },
    };
  });
}

async function recordAnswers(
  act: Act,
  address: { patientId: string; side: Side },
  answers: Partial<EyeHistory> = {},
): Promise<void> {
  const { eye } = await getEyes(address.patientId, address.side, act.transaction);
  await recordHistory(act, { ...address, ifMatch: eye.version, history: { ...UNREMARKABLE, ...answers } });
}

/** Typed in by hand, in the place of the measurement before. */
export function remeasurementSteps(cases: readonly DemoCase[], today: string): SeedStep[] {
  return cases.flatMap(({ person, again }) =>
    (again ?? [])
      .filter(({ because }) => because !== undefined)
      .map((remeasurement) => ({
        at: clinicMoment(today, daysAgoOf(remeasurement.eye), '15:40'),
        by: 'technician' as const,
        async perform(act: Act) {
          const row = templateRow(person, remeasurement.side, { eye: remeasurement.eye, today });
          await supersede(act, row, remeasurement);
        },
      })),
  );
}

async function supersede(
  act: Act,
  row: TemplateRow,
  { side, because }: Pick<DemoRemeasurement, 'side' | 'because'>,
): Promise<void> {
  const { id: patientId } = await getPatientByRecord(act, row.record_number);
  const { eye } = await getEyes(patientId, side, act.transaction);
  const before = ofRecord((await listMeasurements([eye], act.transaction)).get(eye.id));
  const entry = { text: typedMeasurement(row), supersedesId: before?.id ?? null, reason: because ?? '' };
  await addMeasurement(act, { patientId, side }, entry);
}

const REGISTERED_DAYS_AGO = 2;

/** People who are only registered so far. */
export function registrationStep(today: string): SeedStep {
  return {
    at: clinicMoment(today, REGISTERED_DAYS_AGO, '10:15'),
    by: 'technician',
    async perform(act) {
      for (const { record, family, given, born, sex } of NOT_MEASURED_YET) {
        const input = { recordNumber: record, familyName: family, givenName: given, birthDate: born, sex };
        await registerPatient(act, input, { isDemo: true });
      }
    },
  };
}
