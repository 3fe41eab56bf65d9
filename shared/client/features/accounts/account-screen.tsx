import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import { useMutation, useQuery } from '@tanstack/react-query';
import { accountSchema, paths } from '@/shared/contract';
import type { Account } from '@/shared/contract';
import { call, callEmpty } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState, ErrorPanel, Loading, SuccessNote } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { AccountState } from './accounts-screen';
import { RoleBoxes } from './role-boxes';
import { accountsQuery } from './use-accounts';

export function AccountScreen() {
  const { accountId } = useLocalSearchParams<{ accountId: string }>();
  const accounts = useQuery(accountsQuery());
  const account = accounts.data?.items.find((candidate) => candidate.id === accountId);
  return (
    <Screen title={account?.displayName ?? 'Account'} width="reading" back="/accounts" lead={account?.email}>
      {accounts.isPending ? <Loading /> : null}
      {accounts.error ? (
        <ErrorPanel problem={asProblem(accounts.error)} onRetry={() => void accounts.refetch()} />
      ) : null}
      {accounts.data && !account ? (
        <EmptyState title="No such account" hint="It may have been removed. Go back to the list." />
      ) : null}
      {account ? <AccountForm key={account.version} account={account} /> : null}
    </Screen>
  );
}

function AccountForm({ account }: { account: Account }) {
  const [displayName, setDisplayName] = useState(account.displayName);
  const [roles, setRoles] = useState(account.roles);
  const refresh = () => queryClient.invalidateQueries({ queryKey: ['accounts'] });
  const save = useMutation({
    mutationFn: (status: Account['status']) =>
      call(paths.account(account.id), accountSchema, {
        method: 'PUT',
        body: { displayName, roles, status },
        version: account.version,
      }),
    onSuccess: refresh,
  });
  const resend = useMutation({
    mutationFn: () => callEmpty(`${paths.accountInvitation(account.id)}`, { method: 'POST' }),
  });
  const problem = save.error ?? resend.error;
  return (
    <Card title="State" aside={<AccountState status={account.status} />}>
      {problem ? (
        <ErrorPanel
          problem={asProblem(problem)}
          onRetry={() => void refresh()}
          kept="What you typed is still here."
        />
      ) : null}
      {save.isSuccess ? <SuccessNote text="Saved" /> : null}
      {resend.isSuccess ? <SuccessNote text="The invitation is on its way again" /> : null}
      <TextField label="Name" value={displayName} onChange={setDisplayName} isRequired />
      <RoleBoxes roles={roles} onChange={setRoles} />
      <Row>
        <Button
          label="Save"
          kind="primary"
          isBusy={save.isPending}
          onPress={() => save.mutate(account.status)}
        />
        {account.status === 'invited' ? (
          <Button
            label="Send the invitation again"
            isBusy={resend.isPending}
            onPress={() => resend.mutate()}
          />
        ) : null}
        {account.status === 'active' ? (
          <Button label="Disable this account" kind="danger" onPress={() => save.mutate('disabled')} />
        ) : null}
        {account.status === 'disabled' ? (
          <Button label="Enable again" onPress={() => save.mutate('active')} />
        ) : null}
      </Row>
      <Text variant="small" color="ink2">
        Changing roles or disabling ends this person&rsquo;s sessions at once.
      </Text>
    </Card>
  );
}
