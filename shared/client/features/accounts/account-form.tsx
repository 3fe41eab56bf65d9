/** One account: name, roles, state. A change by somebody else meanwhile is compared, never overwritten unseen. */
import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { accountChangeSchema, accountSchema, paths, ROLE_NAMES } from '@/shared/contract';
import type { Account } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { ChangedMeanwhile } from '@/shared/client/components/changed-meanwhile';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel, SuccessNote } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { AccountState } from './account-state';
import { InvitationAgain } from './invitation-again';
import { RoleBoxes } from './role-boxes';
import { StatusChange } from './status-change';

export type AccountChange = Pick<Account, 'displayName' | 'roles' | 'status'>;

export function AccountForm({ account }: { account: Account }) {
  const [stored, setStored] = useState(account);
  const [displayName, setDisplayName] = useState(account.displayName);
  const [roles, setRoles] = useState(account.roles);
  const [messages, setMessages] = useState<string[]>([]);
  const take = (current: Account) => {
    setStored(current);
    setDisplayName(current.displayName);
    setRoles(current.roles);
  };
  const save = useMutation({
    mutationFn: ({ change, version }: { change: AccountChange; version: number }) =>
      call(paths.account(account.id), accountSchema, { method: 'PUT', body: change, version }),
    onSuccess: (saved) => {
      take(saved);
      void queryClient.invalidateQueries({ queryKey: ['accounts'] });
    },
  });
  const mine = { displayName, roles, status: stored.status };
  const submit = (version: number) => {
    const parsed = accountChangeSchema.safeParse(mine);
    setMessages(parsed.success ? [] : parsed.error.issues.map(({ message }) => message));
    if (parsed.success) save.mutate({ change: parsed.data, version });
  };
  const problem = save.error ? asProblem(save.error) : undefined;
  const theirs =
    problem?.code === 'changed-meanwhile' ? accountSchema.safeParse(problem.current).data : undefined;
  return (
    <Card title="State" aside={<AccountState status={stored.status} />}>
      <FormErrors messages={messages} />
      {theirs ? (
        <ChangedMeanwhile
          what="this account"
          values={[
            { label: 'Name', mine: displayName, theirs: theirs.displayName },
            { label: 'Roles', mine: roleWords(roles), theirs: roleWords(theirs.roles) },
            { label: 'State', mine: stored.status, theirs: theirs.status },
          ]}
          isBusy={save.isPending}
          onKeepMine={() => submit(theirs.version)}
          onTakeTheirs={() => {
            take(theirs);
            save.reset();
          }}
        />
      ) : null}
      {problem && !theirs ? <ErrorPanel problem={problem} kept="What you typed is still here." /> : null}
      {save.isSuccess ? <SuccessNote text="Saved" /> : null}
      <TextField label="Name" value={displayName} onChange={setDisplayName} isRequired />
      <RoleBoxes roles={roles} onChange={setRoles} />
      <Row>
        <Button label="Save" kind="primary" isBusy={save.isPending} onPress={() => submit(stored.version)} />
        {stored.status === 'invited' ? <InvitationAgain account={stored} /> : null}
        <StatusChange
          account={stored}
          onChange={(status) =>
            save.mutate({ change: { ...changeOf(stored), status }, version: stored.version })
          }
        />
      </Row>
      <Text variant="small" color="ink2">
        Changing roles or disabling ends this person&rsquo;s sessions at once.
      </Text>
    </Card>
  );
}

const roleWords = (roles: Account['roles']): string => roles.map((role) => ROLE_NAMES[role]).join(', ');

/** What is stored, without what is typed and not saved: disabling must not save a half-typed name. */
const changeOf = ({ displayName, roles, status }: Account): AccountChange => ({ displayName, roles, status });
