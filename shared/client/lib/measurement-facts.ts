/** A measurement as lines of label and value, the same wherever it is shown. */
import { ACD_FROM_NAMES, METHOD_NAMES } from '@/shared/contract';
import type { Measurement, MeasurementValues } from '@/shared/contract';
import {
  formatAxis,
  formatDate,
  formatDecimals,
  formatInstant,
  formatKeratometry,
  formatMm,
  formatWhole,
  MISSING,
} from './format';

export interface MeasurementFact {
  /** The value's name in the contract, to find its column. */
  field: keyof MeasurementValues;
  label: string;
  value: string;
  isNumber?: boolean;
}

const KERATOMETRIC_MM_D = 337.5;

/** Power beside radius: the radius is the ground truth, 1.3375 the index of the power shown. */
function meridian(radiusMm: number, axisDeg: number | null): string {
  const power = formatKeratometry(KERATOMETRIC_MM_D / radiusMm);
  return `${formatMm(radiusMm)} mm, ${power} D${axisDeg === null ? '' : ` @ ${formatAxis(axisDeg)}`}`;
}

const number = (field: MeasurementFact['field'], label: string, value: string): MeasurementFact => ({
  field,
  label,
  value,
  isNumber: true,
});
const words = (field: MeasurementFact['field'], label: string, value: string): MeasurementFact => ({
  field,
  label,
  value: value || MISSING,
});

export function measurementFacts(values: MeasurementValues): MeasurementFact[] {
  const acdFrom = values.acdFrom ? `, from the ${ACD_FROM_NAMES[values.acdFrom]}` : '';
  return [
    number('axialLengthMm', 'Axial length (mm)', formatMm(values.axialLengthMm)),
    number('axialLengthSdMm', 'Axial length SD (mm)', formatMm(values.axialLengthSdMm)),
    number('flatRadiusMm', 'Flat meridian (index 1.3375)', meridian(values.flatRadiusMm, values.flatAxisDeg)),
    number(
      'steepRadiusMm',
      'Steep meridian (index 1.3375)',
      meridian(values.steepRadiusMm, values.steepAxisDeg),
    ),
    number('keratometricIndex', 'Index of the powers given', formatDecimals(values.keratometricIndex, 4)),
    number('acdMm', `Anterior chamber depth (mm)${acdFrom}`, formatMm(values.acdMm)),
    number('lensThicknessMm', 'Lens thickness (mm)', formatMm(values.lensThicknessMm)),
    number('cornealThicknessUm', 'Corneal thickness (µm)', formatWhole(values.cornealThicknessUm)),
    number('whiteToWhiteMm', 'White-to-white (mm)', formatMm(values.whiteToWhiteMm)),
    number('pupilMm', 'Pupil (mm)', formatMm(values.pupilMm)),
    words('method', 'Method', METHOD_NAMES[values.method]),
    words('measuredAt', 'Measured', formatDate(values.measuredAt)),
    words('device', 'Device', values.device),
    words('operator', 'Operator', values.operator),
    words('remarks', 'Remarks', values.remarks),
  ];
}

/** `From biometry.csv, row 12, stored 01 Dec 2026, 09:30 by …` */
export function originWords({
  provenance,
  createdAt,
  createdBy,
}: Pick<Measurement, 'provenance' | 'createdAt' | 'createdBy'>): string {
  const from =
    provenance.kind === 'file'
      ? `From ${provenance.fileName}, row ${provenance.row}`
      : `Entered by ${provenance.enteredBy}`;
  return `${from}; stored ${formatInstant(createdAt)} by ${createdBy}.`;
}
