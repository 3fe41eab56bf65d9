/** One measurement, every value with the column it came from and the text that stood there. */
import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import {
  hasPermission,
  MEASUREMENT_TEXT_COLUMNS,
  measurementSchema,
  paths,
  patientDetailSchema,
} from '@/shared/contract';
import type { Measurement } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Card } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { Mark } from '@/shared/client/components/mark';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { downloadFile } from '@/shared/client/lib/download';
import { formatDate, sideWords } from '@/shared/client/lib/format';
import { measurementFacts, originWords } from '@/shared/client/lib/measurement-facts';
import type { MeasurementFact } from '@/shared/client/lib/measurement-facts';

export function MeasurementScreen() {
  const { measurementId } = useLocalSearchParams<{ measurementId: string }>();
  const query = useQuery({
    queryKey: ['eyes', 'measurement', measurementId],
    queryFn: ({ signal }) => call(paths.measurement(measurementId), measurementSchema, { signal }),
  });
  const measurement = query.data;
  const patientId = measurement?.patientId ?? '';
  const patient = useQuery({
    queryKey: ['patients', patientId],
    queryFn: ({ signal }) => call(paths.patient(patientId), patientDetailSchema, { signal }),
    enabled: measurement !== undefined,
  });
  return (
    <Screen
      title={measurement ? `Measurement, ${sideWords(measurement.side).toLowerCase()}` : 'Measurement'}
      lead={measurement ? formatDate(measurement.values.measuredAt) : undefined}
      back={
        measurement
          ? { pathname: '/patients/[patientId]/[side]', params: { patientId, side: measurement.side } }
          : '/patients'
      }
      strip={
        patient.data && measurement ? (
          <PatientStrip patient={patient.data} side={measurement.side} />
        ) : undefined
      }
    >
      <QueryView query={query}>{(loaded) => <MeasurementBody measurement={loaded} />}</QueryView>
    </Screen>
  );
}

function MeasurementBody({ measurement }: { measurement: Measurement }) {
  const { roles } = useUser();
  const { provenance } = measurement;
  return (
    <>
      {measurement.supersededById ? (
        <Card tone="weigh" label="Superseded">
          <Mark tone="weigh" label="Superseded by a later measurement" />
          <Text>{measurement.supersededReason ?? '—'}</Text>
          <Link
            href={{
              pathname: '/measurements/[measurementId]',
              params: { measurementId: measurement.supersededById },
            }}
            label="To the later one"
          />
        </Card>
      ) : null}
      <Card title="Origin">
        <Text>{originWords(measurement)}</Text>
        {provenance.kind === 'file' && hasPermission(roles, 'import.read') ? (
          <Button
            label="Download the original file"
            onPress={() => void downloadFile(paths.importFile(provenance.importId))}
          />
        ) : null}
      </Card>
      <DataTable
        label="Values and where they came from"
        columns={columnsFor(measurement)}
        items={measurementFacts(measurement.values)}
        keyOf={(fact) => fact.field}
      />
    </>
  );
}

function columnsFor({ provenance }: Measurement): Column<MeasurementFact>[] {
  const raw = provenance.kind === 'file' ? provenance.raw : undefined;
  const value: Column<MeasurementFact> = {
    key: 'value',
    title: 'Value',
    isNumber: true,
    share: 1.4,
    render: (fact) => fact.value,
  };
  const label: Column<MeasurementFact> = {
    key: 'label',
    title: 'What',
    share: 1.6,
    render: (fact) => fact.label,
  };
  if (!raw) return [label, value];
  return [
    label,
    value,
    { key: 'column', title: 'Columns in the file', share: 1.4, render: (fact) => columnsOf(fact).join(', ') },
    {
      key: 'raw',
      title: 'As it stood there',
      share: 1.4,
      render: (fact) =>
        columnsOf(fact)
          .map((column) => raw[column] ?? '')
          .filter(Boolean)
          .join(' / ') || '—',
    },
  ];
}

/** A meridian is told by power, radius and axis; the depth by its value and where it was measured from. */
function columnsOf({ field }: MeasurementFact): string[] {
  const columns = MEASUREMENT_TEXT_COLUMNS;
  if (field === 'flatRadiusMm') return [columns.flatKD, columns.flatRadiusMm, columns.flatAxisDeg];
  if (field === 'steepRadiusMm') return [columns.steepKD, columns.steepRadiusMm, columns.steepAxisDeg];
  return field === 'acdMm' ? [columns.acdMm, columns.acdFrom] : [columns[field]];
}
