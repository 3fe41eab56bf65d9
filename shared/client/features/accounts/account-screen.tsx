import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { EmptyState } from '@/shared/client/components/states';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { AccountForm } from './account-form';
import { accountsQuery } from './use-accounts';

export function AccountScreen() {
  const { accountId } = useLocalSearchParams<{ accountId: string }>();
  const accounts = useQuery(accountsQuery());
  const account = accounts.data?.items.find((candidate) => candidate.id === accountId);
  return (
    <Screen title={account?.displayName ?? 'Account'} width="reading" back="/accounts" lead={account?.email}>
      <QueryView query={accounts} label="Loading the account">
        {() =>
          account ? (
            <AccountForm key={account.id} account={account} />
          ) : (
            <EmptyState title="No such account" hint="The address may be mistyped. Go back to the list." />
          )
        }
      </QueryView>
    </Screen>
  );
}
