/** One patient: both eyes side by side, the right eye on the left-hand side. */
import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { formatPatientName, hasPermission } from '@/shared/contract';
import type { PatientDetail } from '@/shared/contract';
import { useUser } from '@/shared/client/api/session-store';
import { Card, TwoColumns } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { Mark } from '@/shared/client/components/mark';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { formatDate } from '@/shared/client/lib/format';
import { useLayout } from '@/shared/client/theme/theme-context';
import { EyeCard } from './eye-card';
import { patientQuery } from './use-patients';

export function PatientScreen() {
  const { roles } = useUser();
  const { isPhone } = useLayout();
  const { patientId } = useLocalSearchParams<{ patientId: string }>();
  const query = useQuery(patientQuery(patientId));
  const patient = query.data;
  const canWrite = hasPermission(roles, 'patient.write');
  return (
    <Screen
      title={patient ? formatPatientName(patient) : 'Patient'}
      lead={
        patient
          ? `born ${formatDate(patient.birthDate)}, ${patient.sex}, record ${patient.recordNumber}`
          : undefined
      }
      back="/patients"
      strip={patient ? <PatientStrip patient={patient} /> : undefined}
      action={
        canWrite && patient ? (
          <Link
            href={{ pathname: '/patients/[patientId]/edit', params: { patientId } }}
            label="Correct"
            kind="button"
          />
        ) : undefined
      }
    >
      <QueryView query={query}>
        {(loaded) => (
          <>
            <Duplicates patient={loaded} />
            <TwoColumns isSplit={!isPhone}>
              {loaded.eyes.some(({ side }) => side === 'right')
                ? [
                    <EyeCard key="right" patientId={patientId} side="right" />,
                    <EyeCard key="left" patientId={patientId} side="left" />,
                  ]
                : []}
            </TwoColumns>
          </>
        )}
      </QueryView>
    </Screen>
  );
}

function Duplicates({ patient }: { patient: PatientDetail }) {
  if (patient.possibleDuplicates.length === 0) return null;
  return (
    <Card tone="weigh" label="Possible duplicates">
      <Mark tone="weigh" label="Another record has the same name and birth date" />
      {patient.possibleDuplicates.map((other) => (
        <Link
          key={other.id}
          href={{ pathname: '/patients/[patientId]', params: { patientId: other.id } }}
          label={`${formatPatientName(other)}, record ${other.recordNumber}`}
        />
      ))}
    </Card>
  );
}
