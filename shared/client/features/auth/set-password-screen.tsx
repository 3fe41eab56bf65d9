/** Behind an invitation or reset link: shows whose account it is, and sets the password. */
import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import { useMutation, useQuery } from '@tanstack/react-query';
import { newPasswordSchema, passwordLinkSchema, PASSWORD_MIN_LENGTH, paths } from '@/shared/contract';
import { call, callEmpty } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Stack } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { Link } from '@/shared/client/components/link';
import { ErrorPanel, Loading, SuccessNote } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { formatInstant } from '@/shared/client/lib/format';
import { Entrance } from './entrance';

export function SetPasswordScreen() {
  const { token = '' } = useLocalSearchParams<{ token?: string }>();
  const link = useQuery({
    queryKey: ['password-link', token],
    queryFn: ({ signal }) =>
      call(paths.passwordLink(encodeURIComponent(token || 'none')), passwordLinkSchema, { signal }),
    retry: false,
  });
  if (link.isPending) {
    return (
      <Entrance title="Set your password">
        <Loading />
      </Entrance>
    );
  }
  if (link.error) {
    return (
      <Entrance title="This link cannot be used">
        <ErrorPanel problem={asProblem(link.error)} />
        <Link href="/forgot-password" label="Ask for a new link" />
      </Entrance>
    );
  }
  const { displayName, email, expiresAt } = link.data;
  return (
    <Entrance title="Set your password" lead={`${displayName}, ${email}`}>
      <PasswordForm token={token} />
      <Text variant="small" color="ink2">{`The link works once, until ${formatInstant(expiresAt)}.`}</Text>
    </Entrance>
  );
}

function PasswordForm({ token }: { token: string }) {
  const [password, setPassword] = useState('');
  const [repeated, setRepeated] = useState('');
  const [hint, setHint] = useState<string>();
  const save = useMutation({
    mutationFn: () =>
      callEmpty(paths.passwordLink(encodeURIComponent(token)), { method: 'POST', body: { password } }),
  });
  const submit = () => {
    const parsed = newPasswordSchema.safeParse(password);
    if (!parsed.success) return setHint(parsed.error.issues[0]?.message);
    if (password !== repeated) return setHint('The two passwords differ');
    setHint(undefined);
    save.mutate();
  };
  if (save.isSuccess) {
    return (
      <Stack>
        <SuccessNote text="Your password is set" />
        <Link href="/sign-in" label="Sign in" kind="primary" />
      </Stack>
    );
  }
  return (
    <Stack>
      {save.error ? <ErrorPanel problem={asProblem(save.error)} /> : null}
      <TextField
        label="New password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${PASSWORD_MIN_LENGTH} characters; a few words you can remember are good. Pasting works.`}
        value={password}
        onChange={setPassword}
        error={hint}
        isRequired
      />
      <TextField
        label="The same again"
        type="password"
        autoComplete="new-password"
        value={repeated}
        onChange={setRepeated}
        onSubmit={submit}
        isRequired
      />
      <Button label="Set password" kind="primary" isBusy={save.isPending} onPress={submit} isWide />
    </Stack>
  );
}
