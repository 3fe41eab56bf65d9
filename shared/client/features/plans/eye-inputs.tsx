/** What the formulas received, and where it came from. */
import type { PlanDesk } from '@/shared/contract';
import { METHOD_NAMES } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { formatAxis, formatDate, formatKeratometry, formatMm } from '@/shared/client/lib/format';

export function EyeInputs({ desk }: { desk: Pick<PlanDesk, 'calculation' | 'measurement'> }) {
  const { eye, formulaVersion } = desk.calculation;
  const { values, provenance, id } = desk.measurement;
  const origin =
    provenance.kind === 'file'
      ? `${provenance.fileName}, row ${provenance.row}`
      : `entered by ${provenance.enteredBy}`;
  return (
    <Card title="Measurement">
      <Facts
        items={[
          { label: 'Axial length (mm)', value: formatMm(eye.axialLengthMm), isNumber: true },
          { label: 'Mean keratometry (D)', value: formatKeratometry(eye.meanKeratometryD), isNumber: true },
          {
            label: 'Radii, flat / steep (mm)',
            value: `${formatMm(eye.flatRadiusMm)} / ${formatMm(eye.steepRadiusMm)}`,
            isNumber: true,
          },
          {
            label: 'Corneal cylinder (D)',
            value: `${formatKeratometry(eye.cornealCylinderD)} @ ${formatAxis(eye.steepAxisDeg)}`,
            isNumber: true,
          },
          { label: 'ACD from epithelium (mm)', value: formatMm(eye.anteriorChamberDepthMm), isNumber: true },
          { label: 'Lens thickness (mm)', value: formatMm(values.lensThicknessMm), isNumber: true },
          { label: 'Method', value: METHOD_NAMES[eye.method] },
          { label: 'Measured', value: formatDate(values.measuredAt) },
        ]}
      />
      <Text
        variant="small"
        color="ink2"
      >{`${values.device || 'device not given'}; ${origin}. Formula version ${formulaVersion}.`}</Text>
      <Link
        href={{ pathname: '/measurements/[measurementId]', params: { measurementId: id } }}
        label="Where each value came from"
      />
    </Card>
  );
}
