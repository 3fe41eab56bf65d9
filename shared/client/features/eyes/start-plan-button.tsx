import { router } from 'expo-router';
import { useMutation } from '@tanstack/react-query';
import { paths, planDeskSchema } from '@/shared/contract';
import type { Side } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { Button } from '@/shared/client/components/button';
import { ErrorPanel } from '@/shared/client/components/states';

/** Opens the draft of this eye, or begins one. */
export function StartPlanButton({
  patientId,
  side,
  hasDraft,
}: {
  patientId: string;
  side: Side;
  hasDraft: boolean;
}) {
  const start = useMutation({
    mutationFn: () => call(paths.eyePlans(patientId, side), planDeskSchema, { method: 'POST', body: {} }),
    onSuccess: (desk) => {
      for (const key of ['home', 'patients', 'eyes', 'plans'])
        void queryClient.invalidateQueries({ queryKey: [key] });
      router.push({ pathname: '/plans/[planId]', params: { planId: desk.plan.id } });
    },
  });
  return (
    <>
      <Button
        label={hasDraft ? 'Go on with the draft' : 'Start a plan'}
        kind="primary"
        isBusy={start.isPending}
        onPress={() => start.mutate()}
      />
      {start.error ? <ErrorPanel problem={asProblem(start.error)} /> : null}
    </>
  );
}
