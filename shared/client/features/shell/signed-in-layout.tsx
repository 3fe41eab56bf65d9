/**
 * The gate: waits while it is unknown who is there, sends strangers to sign-in with the address they wanted,
 * and puts the frame of the house round every screen behind it.
 */
import { useEffect, useState } from 'react';
import { Redirect, Stack } from 'expo-router';
import { View } from 'react-native';
import { asProblem } from '@/shared/client/api/problem';
import type { ApiProblem } from '@/shared/client/api/problem';
import { resumeSession } from '@/shared/client/api/session';
import { useSession } from '@/shared/client/api/session-store';
import type { WhyOut } from '@/shared/client/api/session-store';
import { ErrorPanel, Loading } from '@/shared/client/components/states';
import { currentPath } from '@/shared/client/lib/next-path';
import { useTheme } from '@/shared/client/theme/theme-context';
import { IdleGuard } from './idle-guard';
import { Shell } from './shell';

export function SignedInLayout() {
  const session = useSession();
  const { colors } = useTheme();
  if (session.status === 'unknown') return <Resuming />;
  if (session.status === 'out') {
    return <Redirect href={{ pathname: '/sign-in', params: waysBack(session.why) }} />;
  }
  return (
    <Shell user={session.user}>
      <IdleGuard />
      <Stack
        screenOptions={{
          headerShown: false,
          animation: 'none',
          contentStyle: { backgroundColor: colors.paper },
        }}
      />
    </Shell>
  );
}

/** Who left on purpose leaves no address behind: the next person at this computer begins at their own start. */
function waysBack(why: WhyOut): Record<string, string> {
  if (why === 'left') return {};
  return { next: currentPath(), ...(why === 'idle' ? { idle: '1' } : {}) };
}

function Resuming() {
  const { colors } = useTheme();
  const [problem, setProblem] = useState<ApiProblem>();
  const resume = () => {
    resumeSession().catch((error: unknown) => setProblem(asProblem(error)));
  };
  const retry = () => {
    setProblem(undefined);
    resume();
  };
  useEffect(resume, []);
  return (
    <View style={{ flex: 1, padding: 24, backgroundColor: colors.paper }}>
      {problem ? <ErrorPanel problem={problem} onRetry={retry} /> : <Loading label="Looking who is there" />}
    </View>
  );
}
