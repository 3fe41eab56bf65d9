/** Invented eyes for the clinical rules: everything answered and nothing to complain of, until a test changes it. */
import type { CheckQuestion } from '@/shared/clinical/measurement-checks';
import type { Eye, Measurement, MeasurementValues, Side } from '@/shared/contract';

const id = (number: number): string => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;

export const PATIENT_ID = id(1);

export const radiusOf = (keratometryD: number): number => 337.5 / keratometryD;

export const PLAIN_VALUES: MeasurementValues = {
  measuredAt: '2026-02-20',
  method: 'optical',
  device: 'Biometer A',
  axialLengthMm: 23.51,
  axialLengthSdMm: 0.02,
  flatRadiusMm: radiusOf(43.25),
  steepRadiusMm: radiusOf(44.1),
  flatKD: 43.25,
  steepKD: 44.1,
  keratometricIndex: 1.3375,
  flatAxisDeg: 175,
  steepAxisDeg: 85,
  acdMm: 3.12,
  acdFrom: 'epithelium',
  lensThicknessMm: 4.55,
  cornealThicknessUm: 545,
  whiteToWhiteMm: 11.9,
  pupilMm: null,
  operator: '',
  remarks: '',
};
/** The other eye: alike, and not a copy. */
export const FELLOW_VALUES: MeasurementValues = {
  ...PLAIN_VALUES,
  axialLengthMm: 23.62,
  flatRadiusMm: radiusOf(43.4),
  steepRadiusMm: radiusOf(44.2),
  lensThicknessMm: 4.5,
};

export function aMeasurement(values: MeasurementValues, side: Side = 'right'): Measurement {
  return {
    id: id(side === 'right' ? 20 : 21),
    patientId: PATIENT_ID,
    side,
    values,
    provenance: { kind: 'manual', enteredBy: 'Invented Technician' },
    createdAt: '2026-02-20T10:00:00.000Z',
    createdBy: 'Invented Technician',
    supersededById: null,
    supersededReason: null,
    isOfRecord: true,
  };
}

export const PLAIN_HISTORY: Eye['history'] = {
  cornealSurgery: 'no',
  cornealSurgeryKind: null,
  lensStatus: 'phakic',
  vitreousStatus: 'vitreous',
  remarks: '',
};

export const anEye = (history: Partial<Eye['history']> = {}, side: Side = 'right'): Eye => ({
  id: id(side === 'right' ? 10 : 11),
  patientId: PATIENT_ID,
  side,
  history: { ...PLAIN_HISTORY, ...history },
  version: 1,
});

export interface CheckCase {
  values?: Partial<MeasurementValues>;
  /** Null: the fellow eye is not measured. */
  fellow?: Partial<MeasurementValues> | null;
  history?: Partial<Eye['history']>;
  fellowHistory?: Partial<Eye['history']>;
  birthDate?: string;
  today?: string;
}

export const aQuestion = ({
  values,
  fellow,
  history,
  fellowHistory,
  birthDate = '1950-04-03',
  today = '2026-03-02',
}: CheckCase = {}): CheckQuestion => ({
  measurement: aMeasurement({ ...PLAIN_VALUES, ...values }),
  fellowMeasurement: fellow === null ? null : aMeasurement({ ...FELLOW_VALUES, ...fellow }, 'left'),
  eye: anEye(history),
  fellowEye: anEye(fellowHistory, 'left'),
  patient: { birthDate },
  today,
});
