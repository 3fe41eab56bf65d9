/** The list of patients, with where each eye stands. Search and page stand in the address. */
import { router, useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { View } from 'react-native';
import { formatPatientName, hasPermission } from '@/shared/contract';
import type { PatientListItem, Side } from '@/shared/contract';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Link } from '@/shared/client/components/link';
import { QueryView } from '@/shared/client/components/query-view';
import { SearchField } from '@/shared/client/components/search-field';
import { Screen } from '@/shared/client/components/screen';
import { StageMark } from '@/shared/client/components/stage-mark';
import { EmptyState } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { formatCount, formatDate } from '@/shared/client/lib/format';
import { patientsQuery } from './use-patients';

const COLUMNS: Column<PatientListItem>[] = [
  { key: 'name', title: 'Patient', share: 1.5, render: formatPatientName },
  { key: 'born', title: 'Born', share: 0.8, render: (patient) => formatDate(patient.birthDate) },
  { key: 'record', title: 'Record', share: 0.7, render: (patient) => patient.recordNumber },
  {
    key: 'right',
    title: 'Right eye',
    share: 1.6,
    render: (patient) => <Stage patient={patient} side="right" />,
  },
  {
    key: 'left',
    title: 'Left eye',
    share: 1.6,
    render: (patient) => <Stage patient={patient} side="left" />,
  },
];

export function PatientsScreen() {
  const { roles } = useUser();
  const { search = '', after = '' } = useLocalSearchParams<{ search?: string; after?: string }>();
  const given = Object.entries({ search, after }).filter(([, value]) => value);
  const patients = useQuery(patientsQuery(new URLSearchParams(given).toString()));
  const canWrite = hasPermission(roles, 'patient.write');
  return (
    <Screen
      title="Patients"
      width="full"
      action={canWrite ? <Link href="/patients/new" label="Register a patient" kind="primary" /> : undefined}
    >
      <SearchField
        label="Find a patient"
        hint="Name, record number, or birth date as YYYY-MM-DD"
        value={search}
        onSearch={(text) => router.setParams({ search: text || undefined, after: undefined })}
      />
      <QueryView query={patients}>
        {({ items, next, total }) => (
          <>
            {total === undefined ? null : <Text color="ink2">{formatCount(total, 'patient')}</Text>}
            <PatientList patients={items} search={search} canWrite={canWrite} />
            {next ? <Button label="More patients" onPress={() => router.setParams({ after: next })} /> : null}
          </>
        )}
      </QueryView>
    </Screen>
  );
}

function PatientList({
  patients,
  search,
  canWrite,
}: {
  patients: readonly PatientListItem[];
  search: string;
  canWrite: boolean;
}) {
  if (patients.length === 0 && search) {
    return (
      <EmptyState title="Nobody found" hint="Try a part of the name, the record number, or the birth date." />
    );
  }
  if (patients.length === 0) {
    const hint = canWrite
      ? 'Import a biometry file, or register the first patient by hand.'
      : 'The technician imports biometry or registers patients.';
    return (
      <EmptyState
        title="No patients yet"
        hint={hint}
        action={canWrite ? <Link href="/imports" label="Import biometry" kind="primary" /> : undefined}
      />
    );
  }
  return (
    <DataTable
      label="Patients"
      columns={COLUMNS}
      items={patients}
      keyOf={(patient) => patient.id}
      linkOf={(patient) => ({
        href: { pathname: '/patients/[patientId]', params: { patientId: patient.id } },
        label: formatPatientName(patient),
      })}
    />
  );
}

function Stage({ patient, side }: { patient: PatientListItem; side: Side }) {
  const eye = patient.eyes.find((candidate) => candidate.side === side);
  return <View>{eye ? <StageMark stage={eye.stage} words={eye.waitsFor} /> : <Text>—</Text>}</View>;
}
