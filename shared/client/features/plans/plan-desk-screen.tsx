/** One plan: the desk of a draft, or what was signed. */
import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import type { PlanDesk } from '@/shared/contract';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState } from '@/shared/client/components/states';
import { formatDate } from '@/shared/client/lib/format';
import { DraftDesk } from './draft-desk';
import { SignedPlan } from './signed-plan';
import { planDeskQuery } from './use-plans';

export function PlanDeskScreen() {
  const { planId } = useLocalSearchParams<{ planId: string }>();
  const query = useQuery(planDeskQuery(planId));
  const desk = query.data;
  return (
    <Screen {...(desk ? headOf(desk) : { title: 'Plan', back: '/plans' as const })} width="full">
      <QueryView query={query} lines={8} label="Calculating">
        {(loaded) => <DeskOf desk={loaded} />}
      </QueryView>
    </Screen>
  );
}

function headOf(desk: PlanDesk) {
  const { patientId, side, sequence } = desk.plan;
  return {
    title: `Plan ${sequence}, ${side} eye`,
    lead: leadOf(desk),
    back: { pathname: '/patients/[patientId]/[side]', params: { patientId, side } } as const,
    strip: <PatientStrip patient={desk.patient} side={side} />,
  };
}

function DeskOf({ desk }: { desk: PlanDesk }) {
  if (desk.plan.status === 'draft') return <DraftDesk desk={desk} />;
  if (desk.plan.status === 'discarded')
    return <EmptyState title="This draft was discarded" hint="Start a new plan on the eye's page." />;
  return <SignedPlan desk={desk} />;
}

function leadOf({ plan }: PlanDesk): string {
  if (plan.status === 'draft') return `Draft of ${plan.createdBy}, ${formatDate(plan.createdAt)}`;
  if (plan.status === 'replaced') return 'Replaced by a newer signed plan';
  return plan.status === 'signed' ? `Signed by ${plan.signedBy ?? '—'}` : 'Discarded';
}
