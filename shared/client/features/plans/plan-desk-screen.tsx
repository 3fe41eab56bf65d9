/** One plan: the desk of a draft, or what was signed. */
import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import type { PlanDesk } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState, ErrorPanel, Loading } from '@/shared/client/components/states';
import { formatDate } from '@/shared/client/lib/format';
import { DraftDesk } from './draft-desk';
import { SignedPlan } from './signed-plan';
import { planDeskQuery } from './use-plans';

export function PlanDeskScreen() {
  const { planId } = useLocalSearchParams<{ planId: string }>();
  const query = useQuery(planDeskQuery(planId));
  const desk = query.data;
  return (
    <Screen
      title={desk ? `Plan ${desk.plan.sequence}, ${desk.plan.side} eye` : 'Plan'}
      lead={desk ? leadOf(desk) : undefined}
      back={
        desk
          ? {
              pathname: '/patients/[patientId]/[side]',
              params: { patientId: desk.plan.patientId, side: desk.plan.side },
            }
          : '/plans'
      }
      strip={desk ? <PatientStrip patient={desk.patient} side={desk.plan.side} /> : undefined}
      width="full"
    >
      {query.isPending ? <Loading lines={8} label="Calculating" /> : null}
      {query.error ? (
        <ErrorPanel problem={asProblem(query.error)} onRetry={() => void query.refetch()} />
      ) : null}
      {desk?.plan.status === 'draft' ? <DraftDesk desk={desk} /> : null}
      {desk?.plan.status === 'discarded' ? (
        <EmptyState title="This draft was discarded" hint="Start a new plan on the eye's page." />
      ) : null}
      {desk && (desk.plan.status === 'signed' || desk.plan.status === 'replaced') ? (
        <SignedPlan desk={desk} />
      ) : null}
    </Screen>
  );
}

function leadOf({ plan }: PlanDesk): string {
  if (plan.status === 'draft') return `Draft of ${plan.createdBy}, ${formatDate(plan.createdAt)}`;
  if (plan.status === 'replaced') return 'Replaced by a newer signed plan';
  return plan.status === 'signed' ? `Signed by ${plan.signedBy ?? '—'}` : 'Discarded';
}
