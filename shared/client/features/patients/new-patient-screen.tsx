import { router } from 'expo-router';
import { useMutation } from '@tanstack/react-query';
import { paths, patientDetailSchema } from '@/shared/contract';
import type { PatientInput } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { useRequestKeys } from '@/shared/client/api/use-request-key';
import { Screen } from '@/shared/client/components/screen';
import { PatientForm } from './patient-form';

const EMPTY: PatientInput = {
  recordNumber: '',
  familyName: '',
  givenName: '',
  birthDate: '',
  sex: 'unknown',
};

export function NewPatientScreen() {
  const keys = useRequestKeys();
  const register = useMutation({
    mutationFn: (input: PatientInput) =>
      call(paths.patients(), patientDetailSchema, {
        method: 'POST',
        body: input,
        idempotencyKey: keys.keyFor(input),
      }),
  });
  const save = (input: PatientInput, forgetDraft: () => void) =>
    register.mutate(input, {
      onSuccess: (patient) => {
        keys.done();
        forgetDraft();
        void queryClient.invalidateQueries({ queryKey: ['patients', 'list'] });
        router.replace({ pathname: '/patients/[patientId]', params: { patientId: patient.id } });
      },
    });
  return (
    <Screen title="Register a patient" width="reading" back="/patients">
      <PatientForm
        name="patient/new"
        initial={EMPTY}
        saveLabel="Register"
        isBusy={register.isPending}
        problem={register.error ? asProblem(register.error) : undefined}
        onSave={save}
      />
    </Screen>
  );
}
