import { useState } from 'react';
import { router } from 'expo-router';
import { useMutation } from '@tanstack/react-query';
import { accountSchema, invitationSchema, paths } from '@/shared/contract';
import type { Role } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
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
  const [messages, setMessages] = useState<string[]>([]);
  const invite = useMutation({
    mutationFn: () =>
      call(paths.accounts(), accountSchema, { method: 'POST', body: { email, displayName, roles } }),
    onSuccess: async () => {
      await queryClient.invalidateQueries({ queryKey: ['accounts'] });
      router.replace('/accounts');
    },
  });
  const submit = () => {
    const parsed = invitationSchema.safeParse({ email, displayName, roles });
    setMessages(parsed.success ? [] : parsed.error.issues.map((issue) => issue.message));
    if (parsed.success) invite.mutate();
  };
  return (
    <Screen
      title="Invite somebody"
      width="reading"
      back="/accounts"
      lead="They get a mail with a link that sets their password; it works once, for three days."
    >
      <FormErrors messages={messages} />
      {invite.error ? (
        <ErrorPanel problem={asProblem(invite.error)} kept="What you typed is still here." />
      ) : null}
      <Card label="Invitation">
        <TextField label="Name" value={displayName} onChange={setDisplayName} isRequired />
        <TextField label="E-mail" type="email" value={email} onChange={setEmail} isRequired />
        <RoleBoxes roles={roles} onChange={setRoles} />
        <Button label="Send the invitation" kind="primary" isBusy={invite.isPending} onPress={submit} />
      </Card>
    </Screen>
  );
}
