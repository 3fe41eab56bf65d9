import { useQuery } from '@tanstack/react-query';
import { ROLE_NAMES } from '@/shared/contract';
import type { Account } from '@/shared/contract';
import { Link } from '@/shared/client/components/link';
import { Screen } from '@/shared/client/components/screen';
import { QueryView } from '@/shared/client/components/query-view';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { formatInstant } from '@/shared/client/lib/format';
import { AccountState } from './account-state';
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
      <QueryView query={accounts} label="Loading accounts">
        {({ items }) => (
          <DataTable
            label="Accounts"
            columns={COLUMNS}
            items={items}
            keyOf={(account) => account.id}
            linkOf={(account) => ({
              href: { pathname: '/accounts/[accountId]', params: { accountId: account.id } },
              label: account.displayName,
            })}
          />
        )}
      </QueryView>
    </Screen>
  );
}
