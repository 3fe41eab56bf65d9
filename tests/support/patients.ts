/** Invented patients by HTTP. */
import { paths, type PatientDetail, type PatientInput, type Side } from '@/shared/contract';
import type { SignedIn } from './test-app';

export const aPatient = (change: Partial<PatientInput> = {}): PatientInput => ({
  recordNumber: 'R-100',
  familyName: 'Invented',
  givenName: 'Ada',
  birthDate: '1950-04-03',
  sex: 'female',
  ...change,
});

export async function register(
  technician: SignedIn,
  change: Partial<PatientInput> = {},
): Promise<PatientDetail> {
  const reply = await technician.post(paths.patients(), aPatient(change));
  expect(reply.status).toBe(201);
  return reply.body as PatientDetail;
}

/** A measurement as it is typed; the good one with its changes. */
export const anEntry = (change: Record<string, string> = {}) => ({
  text: {
    measuredAt: '2026-02-20',
    method: 'optical',
    device: 'Biometer A',
    axialLengthMm: '23.51',
    axialLengthSdMm: '0.02',
    flatKD: '43.25',
    flatAxisDeg: '175',
    steepKD: '44.10',
    steepAxisDeg: '85',
    keratometricIndex: '1.3375',
    acdMm: '3.12',
    acdFrom: 'epithelium',
    lensThicknessMm: '4.55',
    cornealThicknessUm: '545',
    whiteToWhiteMm: '11.9',
    ...change,
  },
  supersedesId: null as string | null,
  reason: '',
});

/** The history of an eye without anything that holds it up. */
export const PLAIN_HISTORY = {
  cornealSurgery: 'no',
  cornealSurgeryKind: null,
  lensStatus: 'phakic',
  vitreousStatus: 'vitreous',
  remarks: '',
} as const;

export async function answerHistory(technician: SignedIn, patientId: string, side: Side): Promise<void> {
  const reply = await technician.put(paths.eyeHistory(patientId, side), PLAIN_HISTORY, 0);
  expect(reply.status).toBe(200);
}
