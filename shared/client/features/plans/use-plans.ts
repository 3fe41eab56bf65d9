/** Reading and changing plans. Every change carries the version it was made on. */
import { queryOptions, useMutation } from '@tanstack/react-query';
import { paths, planDeskSchema, planPageSchema } from '@/shared/contract';
import type { PlanChange, PlanDesk } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { queryClient } from '@/shared/client/api/query-client';

export const planDeskQuery = (planId: string) =>
  queryOptions({
    queryKey: ['plans', 'desk', planId],
    queryFn: ({ signal }) => call(paths.plan(planId), planDeskSchema, { signal }),
    staleTime: 0,
  });

export const plansQuery = (query: string) =>
  queryOptions({
    queryKey: ['plans', 'list', query],
    queryFn: ({ signal }) => call(`${paths.plans()}?${query}`, planPageSchema, { signal }),
  });

/** The desk after an act, put where the screen reads it; everything that lists plans or stages is asked anew. */
function keepDesk(desk: PlanDesk): void {
  queryClient.setQueryData(planDeskQuery(desk.plan.id).queryKey, desk);
  for (const key of ['home', 'patients', 'eyes']) void queryClient.invalidateQueries({ queryKey: [key] });
  void queryClient.invalidateQueries({ queryKey: ['plans', 'list'] });
}

export function useChangePlan(desk: PlanDesk) {
  return useMutation({
    mutationFn: (change: Partial<PlanChange>) => {
      const body: PlanChange = { ...desk.plan.input, choice: desk.plan.choice, ...change };
      return call(paths.plan(desk.plan.id), planDeskSchema, {
        method: 'PUT',
        body,
        version: desk.plan.version,
      });
    },
    onSuccess: keepDesk,
  });
}

export interface Signature {
  password: string;
  confirmedSide: 'right' | 'left';
  acknowledgedRuleIds: string[];
}

export function useSignPlan(desk: PlanDesk) {
  return useMutation({
    mutationFn: (signature: Signature) =>
      call(paths.planSign(desk.plan.id), planDeskSchema, {
        method: 'POST',
        body: { ...signature, version: desk.plan.version, shownDigest: desk.shownDigest },
      }),
    onSuccess: keepDesk,
  });
}

export function useDiscardPlan(desk: PlanDesk) {
  return useMutation({
    mutationFn: () => call(paths.planDiscard(desk.plan.id), planDeskSchema, { method: 'POST' }),
    onSuccess: keepDesk,
  });
}

/** A new draft for one eye, with the practice's usual starting values. */
export function useStartPlan() {
  return useMutation({
    mutationFn: ({ patientId, side }: { patientId: string; side: 'right' | 'left' }) =>
      call(paths.eyePlans(patientId, side), planDeskSchema, { method: 'POST', body: {} }),
    onSuccess: keepDesk,
  });
}
