import { useQuery } from '@tanstack/react-query';
import { ROLE_NAMES } from '@/shared/contract';
import type { Account } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import { Link } from '@/shared/client/components/link';
import { Mark, Tag } from '@/shared/client/components/mark';
import { Screen } from '@/shared/client/components/screen';
import { ErrorPanel, Loading } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { formatInstant } from '@/shared/client/lib/format';
import { accountsQuery } from './use-accounts';

const COLUMNS: Column<Account>[] = [
  { key: 'name', title: 'Name', share: 1.4, render: (account) => account.displayName },
  { key: 'email', title: 'E-mail', share: 1.6, render: (account) => account.email },
  {
    key: 'roles',
    title: 'Roles',
    share: 1.4,
    render: (account) => account.roles.map((role) => ROLE_NAMES[role]).join(', '),
  },
  { key: 'status', title: 'State', render: (account) => <AccountState status={account.status} /> },
  { key: 'last', title: 'Last sign-in', render: (account) => formatInstant(account.lastSignInAt) },
];

export function AccountsScreen() {
  const accounts = useQuery(accountsQuery());
  return (
    <Screen
      title="Accounts"
      lead="Who may do what in this practice"
      action={<Link href="/accounts/invite" label="Invite somebody" kind="primary" />}
    >
      {accounts.isPending ? <Loading lines={6} /> : null}
      {accounts.error ? (
        <ErrorPanel problem={asProblem(accounts.error)} onRetry={() => void accounts.refetch()} />
      ) : null}
      {accounts.data ? (
        <DataTable
          label="Accounts"
          columns={COLUMNS}
          items={accounts.data.items}
          keyOf={(account) => account.id}
          linkOf={(account) => ({
            href: { pathname: '/accounts/[accountId]', params: { accountId: account.id } },
            label: account.displayName,
          })}
        />
      ) : null}
    </Screen>
  );
}

export function AccountState({ status }: { status: Account['status'] }) {
  if (status === 'active') return <Mark tone="fair" label="active" />;
  return (
    <Tag
      label={status === 'invited' ? 'invited, not yet come' : 'disabled'}
      color={status === 'invited' ? 'rust' : 'stop'}
    />
  );
}
