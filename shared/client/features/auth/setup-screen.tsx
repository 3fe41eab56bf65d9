/** An empty practice: the first administrator, with the one-time code that the server printed. */
import { useState } from 'react';
import { Redirect } from 'expo-router';
import { useMutation, useQuery } from '@tanstack/react-query';
import { accountSchema, firstAdministratorSchema, PASSWORD_MIN_LENGTH, paths } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { signIn } from '@/shared/client/api/session';
import { Button } from '@/shared/client/components/button';
import { Stack } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel, Loading } from '@/shared/client/components/states';
import { Entrance } from './entrance';
import { practiceQuery } from './use-practice';

const EMPTY = { code: '', email: '', displayName: '', password: '' };

export function SetupScreen() {
  const practice = useQuery(practiceQuery());
  if (practice.data && !practice.data.needsFirstAdministrator) return <Redirect href="/home" />;
  return (
    <Entrance
      title="Create the first administrator"
      lead="The one-time code stands on the console where the server was started."
    >
      {practice.isPending ? <Loading /> : null}
      {practice.error ? (
        <ErrorPanel problem={asProblem(practice.error)} onRetry={() => void practice.refetch()} />
      ) : null}
      {practice.data ? <SetupForm /> : null}
    </Entrance>
  );
}

function SetupForm() {
  const [values, setValues] = useState(EMPTY);
  const [messages, setMessages] = useState<string[]>([]);
  const create = useMutation({
    mutationFn: async () => {
      await call(paths.setup(), accountSchema, { method: 'POST', body: values });
      await signIn({ email: values.email, password: values.password });
      await queryClient.invalidateQueries({ queryKey: ['practice'] });
    },
  });
  const submit = () => {
    const parsed = firstAdministratorSchema.safeParse(values);
    setMessages(parsed.success ? [] : parsed.error.issues.map((issue) => issue.message));
    if (parsed.success) create.mutate();
  };
  const field = (name: keyof typeof EMPTY) => ({
    value: values[name],
    onChange: (text: string) => setValues((before) => ({ ...before, [name]: text })),
    isRequired: true,
  });
  return (
    <Stack>
      <FormErrors messages={messages} />
      {create.error ? (
        <ErrorPanel problem={asProblem(create.error)} kept="What you typed is still here." />
      ) : null}
      <TextField label="Code" {...field('code')} />
      <TextField label="Your name" {...field('displayName')} />
      <TextField label="E-mail" type="email" autoComplete="username" {...field('email')} />
      <TextField
        label="Password"
        type="password"
        autoComplete="new-password"
        hint={`At least ${PASSWORD_MIN_LENGTH} characters`}
        {...field('password')}
      />
      <Button label="Create" kind="primary" isBusy={create.isPending} onPress={submit} isWide />
    </Stack>
  );
}
