/** Smallest rows that the tables accept, for tests of the database itself. */
import type { Transaction } from 'sequelize';
import { AccountModel } from '@/server/db/models/account';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { EyeModel } from '@/server/db/models/eye';
import { FlagSettlementModel } from '@/server/db/models/flag-settlement';
import { MeasurementModel } from '@/server/db/models/measurement';
import { PatientModel } from '@/server/db/models/patient';
import { PlanModel } from '@/server/db/models/plan';

const AT = '2026-03-02T09:00:00.000Z';
const made = { createdAt: AT, updatedAt: AT };

const input = {
  measurementId: 'measurement-1',
  targetD: -0.25,
  toleranceD: 0.5 as const,
  formulas: ['haigis' as const],
  leadingFormula: null,
  lensIds: ['lens-1'],
  axialLengthAdjustment: 'none' as const,
  note: '',
};

export const SIGNATURE = {
  choice: { lensId: 'lens-1', powerD: 21.5 },
  signedBy: 'account-1',
  signedAt: AT,
  snapshot: '{"schema":1}',
  digest: 'abc',
};

/** One of each: account, patient, right eye, two measurements, settlement, draft, audit entry. */
export async function addOneOfEach(transaction: Transaction): Promise<void> {
  const options = { transaction };
  await AccountModel.create(
    {
      id: 'account-1',
      email: 'a@b.example',
      displayName: 'A',
      roles: ['surgeon'],
      status: 'invited',
      ...made,
    },
    options,
  );
  await PatientModel.create(
    {
      id: 'patient-1',
      recordNumber: 'R-1',
      familyName: 'Sand',
      givenName: 'Bo',
      birthDate: '1950-01-31',
      sex: 'female',
      searchKey: 'sand bo r-1',
      ...made,
    },
    options,
  );
  await EyeModel.create({ id: 'eye-1', patientId: 'patient-1', side: 'right', ...made }, options);
  await addMeasurement('measurement-1', transaction);
  await addMeasurement('measurement-2', transaction);
  await FlagSettlementModel.create(
    { id: 's-1', eyeId: 'eye-1', ruleId: 'rule', reason: 'seen', settledBy: 'account-1', settledAt: AT },
    options,
  );
  await addDraft({ id: 'plan-1', sequence: 1 }, transaction);
  await AuditEntryModel.create(
    {
      at: AT,
      actorId: 'account-1',
      actorName: 'A',
      action: 'patient.create',
      noun: 'patient',
      nounId: 'patient-1',
      patientId: 'patient-1',
      version: 0,
      requestId: null,
      detail: {},
    },
    options,
  );
}

export async function addDraft(
  plan: { id: string; sequence: number },
  transaction: Transaction,
): Promise<void> {
  await PlanModel.create(
    { ...plan, eyeId: 'eye-1', status: 'draft', input, createdBy: 'account-1', ...made },
    { transaction },
  );
}

async function addMeasurement(id: string, transaction: Transaction): Promise<void> {
  await MeasurementModel.create(
    {
      id,
      eyeId: 'eye-1',
      measuredAt: '2026-03-01',
      method: 'optical',
      device: 'Optical biometer',
      axialLengthMm: 23.52,
      axialLengthSdMm: 0.02,
      flatRadiusMm: 7.85,
      steepRadiusMm: 7.72,
      flatKD: null,
      steepKD: null,
      keratometricIndex: null,
      flatAxisDeg: 178,
      steepAxisDeg: 88,
      acdMm: 3.11,
      acdFrom: 'epithelium',
      lensThicknessMm: 4.6,
      cornealThicknessUm: 545,
      whiteToWhiteMm: 11.9,
      pupilMm: null,
      operator: '',
      remarks: '',
      contentHash: id,
      createdBy: 'account-1',
      createdAt: AT,
    },
    { transaction },
  );
}
