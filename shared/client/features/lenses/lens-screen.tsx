import { useLocalSearchParams } from 'expo-router';
import { useMutation, useQuery } from '@tanstack/react-query';
import { hasPermission, lensDetailSchema, paths } from '@/shared/contract';
import type { LensDetail, LensInput } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { useUser } from '@/shared/client/api/session-store';
import { Screen } from '@/shared/client/components/screen';
import { ErrorPanel, Loading, SuccessNote } from '@/shared/client/components/states';
import { ConstantHistory } from './constant-history';
import { LensForm } from './lens-form';
import { lensToForm } from './lens-form-values';
import { LensTags } from './lenses-screen';
import { lensQuery } from './use-lenses';

export function LensScreen() {
  const { lensId } = useLocalSearchParams<{ lensId: string }>();
  const lens = useQuery(lensQuery(lensId));
  return (
    <Screen
      title={lens.data?.name ?? 'Lens model'}
      back="/lenses"
      action={lens.data ? <LensTags lens={lens.data} /> : undefined}
    >
      {lens.isPending ? <Loading lines={8} /> : null}
      {lens.error ? <ErrorPanel problem={asProblem(lens.error)} onRetry={() => void lens.refetch()} /> : null}
      {lens.data ? <LensEditor lens={lens.data} /> : null}
    </Screen>
  );
}

function LensEditor({ lens }: { lens: LensDetail }) {
  const user = useUser();
  const save = useMutation({
    mutationFn: (input: LensInput) =>
      call(paths.lens(lens.id), lensDetailSchema, { method: 'PUT', body: input, version: lens.version }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['lenses'] }),
  });
  return (
    <>
      {save.isSuccess ? (
        <SuccessNote text="Saved. Signed plans keep what they were signed with and say that they are out of date." />
      ) : null}
      <LensForm
        key={lens.version}
        initial={lensToForm(lens)}
        isBusy={save.isPending}
        isReadOnly={!hasPermission(user.roles, 'lens.write')}
        problem={save.error ? asProblem(save.error) : undefined}
        onSave={(input) => save.mutate(input)}
      />
      <ConstantHistory lens={lens} />
    </>
  );
}
