/** The list of plans: signed ones for everybody who reads them, drafts for the surgeon. The choice in plain words. */
import { router, useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { hasPermission } from '@/shared/contract';
import type { PlanListItem } from '@/shared/contract';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { RadioGroup } from '@/shared/client/components/choices';
import { Mark, Tag } from '@/shared/client/components/mark';
import { QueryView } from '@/shared/client/components/query-view';
import { SearchField } from '@/shared/client/components/search-field';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { formatDate, sideWords } from '@/shared/client/lib/format';
import { plansQuery } from './use-plans';

const STATUSES = [
  { value: 'signed', label: 'Signed' },
  { value: 'draft', label: 'Drafts' },
  { value: 'replaced', label: 'Replaced' },
] as const;
type Status = (typeof STATUSES)[number]['value'];

const COLUMNS: Column<PlanListItem>[] = [
  { key: 'patient', title: 'Patient', share: 1.3, render: (plan) => plan.patientName },
  {
    key: 'born',
    title: 'Born, record',
    share: 1.2,
    render: (plan) => `${formatDate(plan.birthDate)}, ${plan.recordNumber}`,
  },
  { key: 'side', title: 'Side', share: 0.7, render: (plan) => sideWords(plan.side) },
  { key: 'words', title: 'Choice', share: 3, render: (plan) => plan.plainWords },
  {
    key: 'signed',
    title: 'Signed',
    share: 1.2,
    render: (plan) => (plan.signedBy ? `${plan.signedBy}, ${formatDate(plan.signedAt)}` : '—'),
  },
  { key: 'state', title: 'State', share: 1, render: (plan) => <PlanState plan={plan} /> },
];

export function PlansScreen() {
  const { roles } = useUser();
  const { status, search, after } = useListState();
  const given = Object.entries({ status, search, after }).filter(([, value]) => value);
  const plans = useQuery(plansQuery(new URLSearchParams(given).toString()));
  const options = hasPermission(roles, 'plan.write')
    ? STATUSES
    : STATUSES.filter((option) => option.value !== 'draft');
  return (
    <Screen title="Plans" lead="Which lens for which eye, and who signed it" width="full">
      <SearchField
        label="Find a patient"
        value={search}
        onSearch={(text) => router.setParams({ search: text || undefined, after: undefined })}
      />
      <RadioGroup
        label="Show"
        options={options}
        value={status}
        onChange={(value) => router.setParams({ status: value, after: undefined })}
      />
      <QueryView query={plans}>
        {({ items, next }) => (
          <>
            <PlanList plans={items} search={search} />
            {next ? <Button label="Older plans" onPress={() => router.setParams({ after: next })} /> : null}
          </>
        )}
      </QueryView>
    </Screen>
  );
}

/** List state lives in the address, so that Back and a link sent to a colleague show the same list. */
function useListState(): { status: Status; search: string; after: string } {
  const params = useLocalSearchParams<{ status?: string; search?: string; after?: string }>();
  const status = STATUSES.find((option) => option.value === params.status)?.value ?? 'signed';
  return { status, search: params.search ?? '', after: params.after ?? '' };
}

function PlanList({ plans, search }: { plans: readonly PlanListItem[]; search: string }) {
  if (plans.length === 0) {
    return (
      <EmptyState
        title={search ? 'No plan of such a patient' : 'No plans here yet'}
        hint="A surgeon starts a plan on the page of an eye and signs it there."
      />
    );
  }
  return (
    <DataTable
      label="Plans"
      columns={COLUMNS}
      items={plans}
      keyOf={(plan) => plan.id}
      linkOf={(plan) => ({
        href: { pathname: '/plans/[planId]', params: { planId: plan.id } },
        label: plan.patientName,
      })}
    />
  );
}

function PlanState({ plan }: { plan: PlanListItem }) {
  if (plan.outOfDateReasons.length > 0) return <Mark tone="stop" label="out of date" />;
  if (plan.status === 'signed') return <Mark tone="fair" label="signed" />;
  return <Tag label={plan.status} color={plan.status === 'draft' ? 'rust' : 'ink2'} />;
}
