/** Correcting a patient; a change by somebody else meanwhile is compared, never overwritten unseen. */
import { router, useLocalSearchParams } from 'expo-router';
import { useMutation, useQuery } from '@tanstack/react-query';
import { paths, patientDetailSchema, patientSchema } from '@/shared/contract';
import type { PatientDetail, PatientInput } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { ChangedMeanwhile } from '@/shared/client/components/changed-meanwhile';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { PatientForm } from './patient-form';
import { patientQuery } from './use-patients';

const FIELDS = [
  ['recordNumber', 'Record number'],
  ['familyName', 'Family name'],
  ['givenName', 'Given name'],
  ['birthDate', 'Birth date'],
  ['sex', 'Sex'],
] as const;

export function EditPatientScreen() {
  const { patientId } = useLocalSearchParams<{ patientId: string }>();
  const patient = useQuery(patientQuery(patientId));
  return (
    <Screen
      title="Correct a patient"
      width="reading"
      back={{ pathname: '/patients/[patientId]', params: { patientId } }}
      lead="Signed plans of this patient will say that they are out of date."
    >
      <QueryView query={patient}>{(loaded) => <Editor key={loaded.id} patient={loaded} />}</QueryView>
    </Screen>
  );
}

function Editor({ patient }: { patient: PatientDetail }) {
  const correct = useMutation({
    mutationFn: ({ input, version }: { input: PatientInput; version: number }) =>
      call(paths.patient(patient.id), patientDetailSchema, { method: 'PUT', body: input, version }),
  });
  const leave = () => {
    for (const key of ['patients', 'eyes', 'plans']) void queryClient.invalidateQueries({ queryKey: [key] });
    router.replace({ pathname: '/patients/[patientId]', params: { patientId: patient.id } });
  };
  const problem = correct.error ? asProblem(correct.error) : undefined;
  const theirs =
    problem?.code === 'changed-meanwhile' ? patientSchema.safeParse(problem.current).data : undefined;
  const mine = correct.variables?.input;
  return (
    <>
      {theirs && mine ? (
        <ChangedMeanwhile
          what="this patient"
          values={FIELDS.map(([field, label]) => ({ label, mine: mine[field], theirs: theirs[field] }))}
          isBusy={correct.isPending}
          onKeepMine={() => correct.mutate({ input: mine, version: theirs.version }, { onSuccess: leave })}
          onTakeTheirs={leave}
        />
      ) : null}
      <PatientForm
        name={`patient/${patient.id}`}
        initial={patient}
        saveLabel="Save"
        isBusy={correct.isPending}
        problem={theirs ? undefined : problem}
        onSave={(input, forgetDraft) =>
          correct.mutate(
            { input, version: patient.version },
            {
              onSuccess: () => {
                forgetDraft();
                leave();
              },
            },
          )
        }
      />
    </>
  );
}
