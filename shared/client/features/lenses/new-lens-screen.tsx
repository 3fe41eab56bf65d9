import { useMemo } from 'react';
import { router } from 'expo-router';
import { useMutation } from '@tanstack/react-query';
import { lensSchema, paths } from '@/shared/contract';
import type { LensInput } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { Screen } from '@/shared/client/components/screen';
import { LensForm } from './lens-form';
import { emptyLens } from './lens-form-values';

export function NewLensScreen() {
  const initial = useMemo(() => emptyLens(), []);
  const save = useMutation({
    mutationFn: (input: LensInput) => call(paths.lenses(), lensSchema, { method: 'POST', body: input }),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: ['lenses'] });
      router.replace('/lenses');
    },
  });
  return (
    <Screen title="Add a lens model" back="/lenses">
      <LensForm
        initial={initial}
        isBusy={save.isPending}
        isReadOnly={false}
        problem={save.error ? asProblem(save.error) : undefined}
        onSave={(input) => save.mutate(input)}
      />
    </Screen>
  );
}
