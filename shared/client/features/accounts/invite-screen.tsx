import { useState } from 'react';
import { router } from 'expo-router';
import { useMutation } from '@tanstack/react-query';
import { accountSchema, invitationSchema, paths } from '@/shared/contract';
import type { Role } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { useRequestKeys } from '@/shared/client/api/use-request-key';
import { Button } from '@/shared/client/components/button';
import { Card } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { Screen } from '@/shared/client/components/screen';
import { ErrorPanel } from '@/shared/client/components/states';
import { RoleBoxes } from './role-boxes';

export function InviteScreen() {
  const [email, setEmail] = useState('');
  const [displayName, setDisplayName] = useState('');
  const [roles, setRoles] = useState<Role[]>([]);
  const [errors, setErrors] = useState<Partial<Record<string, string>>>({});
  const keys = useRequestKeys();
  const body = { email, displayName, roles };
  const invite = useMutation({
    mutationFn: () =>
      call(paths.accounts(), accountSchema, { method: 'POST', body, idempotencyKey: keys.keyFor(body) }),
    onSuccess: async () => {
      keys.done();
      await queryClient.invalidateQueries({ queryKey: ['accounts'] });
      router.replace('/accounts');
    },
  });
  const submit = () => {
    const parsed = invitationSchema.safeParse(body);
    const issues = parsed.error?.issues ?? [];
    setErrors(Object.fromEntries(issues.map(({ path, message }) => [String(path[0]), message])));
    if (parsed.success) invite.mutate();
  };
  const problem = invite.error ? asProblem(invite.error) : undefined;
  return (
    <Screen
      title="Invite somebody"
      width="reading"
      back="/accounts"
      lead="They get a mail with a link that sets their password; it works once, for three days."
    >
      <FormErrors messages={Object.values(errors).filter((message) => message !== undefined)} />
      {problem ? <ErrorPanel problem={problem} kept="What you typed is still here." /> : null}
      <Card label="Invitation">
        <TextField
          label="Name"
          value={displayName}
          onChange={setDisplayName}
          error={errors.displayName}
          isRequired
        />
        <TextField
          label="E-mail"
          type="email"
          value={email}
          onChange={setEmail}
          error={errors.email ?? problem?.messageFor('email')}
          isRequired
        />
        <RoleBoxes roles={roles} onChange={setRoles} />
        <Button label="Send the invitation" kind="primary" isBusy={invite.isPending} onPress={submit} />
      </Card>
    </Screen>
  );
}
