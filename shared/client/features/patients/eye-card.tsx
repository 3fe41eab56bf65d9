/** One eye in brief: where it stands, what was measured, what was planned; the way to its page. */
import { useQuery } from '@tanstack/react-query';
import { METHOD_NAMES } from '@/shared/contract';
import type { EyeDesk, EyeStage, Side } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { Mark } from '@/shared/client/components/mark';
import { SideWords } from '@/shared/client/components/patient-strip';
import { QueryView } from '@/shared/client/components/query-view';
import { StageMark } from '@/shared/client/components/stage-mark';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { formatCount, formatDate, formatKeratometry, formatMm } from '@/shared/client/lib/format';
import { eyeQuery } from './use-patients';

export function EyeCard({ patientId, side }: { patientId: string; side: Side }) {
  const query = useQuery(eyeQuery(patientId, side));
  return (
    <Card label={`${side} eye`}>
      <SideWords side={side} variant="title" />
      <QueryView query={query}>{(desk) => <EyeBrief desk={desk} />}</QueryView>
    </Card>
  );
}

function EyeBrief({ desk }: { desk: EyeDesk }) {
  const { patient, eye, flags, plans } = desk;
  const current = desk.measurements.find((measurement) => measurement.isOfRecord);
  const open = flags.filter((flag) => flag.severity === 'stop' && !flag.settlement).length;
  const weigh = flags.filter((flag) => flag.severity === 'weigh').length;
  return (
    <>
      <StageMark stage={desk.stage as EyeStage} words={desk.waitsFor} />
      {current ? (
        <Facts
          items={[
            { label: 'Axial length (mm)', value: formatMm(current.values.axialLengthMm), isNumber: true },
            {
              label: 'Keratometry, flat / steep (D)',
              value: `${formatKeratometry(337.5 / current.values.flatRadiusMm)} / ${formatKeratometry(337.5 / current.values.steepRadiusMm)}`,
              isNumber: true,
            },
            {
              label: 'Measured',
              value: `${formatDate(current.values.measuredAt)}, ${METHOD_NAMES[current.values.method]}`,
            },
          ]}
        />
      ) : (
        <Text color="ink2">Not measured yet.</Text>
      )}
      {open > 0 ? <Mark tone="stop" label={formatCount(open, 'open stop')} /> : null}
      {weigh > 0 ? <Mark tone="weigh" label={`${weigh} to weigh`} /> : null}
      {plans[0] ? (
        <Text>{`Plan ${plans[0].sequence}, ${plans[0].status}: ${plans[0].plainWords}`}</Text>
      ) : null}
      <Link
        href={{ pathname: '/patients/[patientId]/[side]', params: { patientId: patient.id, side: eye.side } }}
        label={`Open the ${eye.side} eye`}
        kind="primary"
      />
    </>
  );
}
