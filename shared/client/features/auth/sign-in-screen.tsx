import { useState } from 'react';
import { Redirect, useLocalSearchParams } from 'expo-router';
import type { Href } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { asProblem } from '@/shared/client/api/problem';
import type { ApiProblem } from '@/shared/client/api/problem';
import { signIn } from '@/shared/client/api/session';
import { useSession } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Stack } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { Link } from '@/shared/client/components/link';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { safeNextPath } from '@/shared/client/lib/next-path';
import { DemoAccounts } from './demo-accounts';
import { Entrance } from './entrance';
import { practiceQuery } from './use-practice';

export function SignInScreen() {
  const session = useSession();
  const { next, idle } = useLocalSearchParams<{ next?: string; idle?: string }>();
  const { data: practice } = useQuery(practiceQuery());
  if (session.status === 'in') return <Redirect href={safeNextPath(next) as Href} />;
  if (practice?.needsFirstAdministrator) return <Redirect href="/setup" />;
  const lead = idle
    ? 'You were signed out after 15 quiet minutes. What you were typing is kept.'
    : practice?.name;
  return (
    <Entrance title="Sign in" lead={lead}>
      <SignInForm />
      {practice && practice.demoAccounts.length > 0 ? (
        <DemoAccounts accounts={practice.demoAccounts} />
      ) : null}
    </Entrance>
  );
}

function SignInForm() {
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [problem, setProblem] = useState<ApiProblem>();
  const [isBusy, setIsBusy] = useState(false);
  const submit = async () => {
    setIsBusy(true);
    setProblem(undefined);
    try {
      await signIn({ email, password });
    } catch (error) {
      setProblem(asProblem(error));
    } finally {
      setIsBusy(false);
    }
  };
  return (
    <Stack>
      {problem ? <ErrorPanel problem={problem} /> : null}
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        value={email}
        onChange={setEmail}
        isRequired
      />
      <TextField
        label="Password"
        type="password"
        autoComplete="current-password"
        value={password}
        onChange={setPassword}
        onSubmit={() => void submit()}
        isRequired
      />
      <Button label="Sign in" kind="primary" isBusy={isBusy} onPress={() => void submit()} isWide />
      <Link href="/forgot-password" label="Forgot your password?" />
      <Text variant="small" color="ink2">
        Decision support for trained clinicians; it does not replace judgement, local codes or licensed
        practice.
      </Text>
    </Stack>
  );
}
