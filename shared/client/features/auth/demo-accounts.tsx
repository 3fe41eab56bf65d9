/** In the demonstration only: one button per invented person, since nobody should have to copy passwords. */
import { useState } from 'react';
import { ROLE_NAMES } from '@/shared/contract';
import type { Practice } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import type { ApiProblem } from '@/shared/client/api/problem';
import { signIn } from '@/shared/client/api/session';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';

export function DemoAccounts({ accounts }: { accounts: Practice['demoAccounts'] }) {
  const [busy, setBusy] = useState<string>();
  const [problem, setProblem] = useState<ApiProblem>();
  const enter = async (account: { email: string; password: string }) => {
    setBusy(account.email);
    try {
      await signIn(account);
    } catch (error) {
      setProblem(asProblem(error));
    } finally {
      setBusy(undefined);
    }
  };
  return (
    <Card title="Try it as" tone="rust">
      <Text color="ink2">These people are invented. Each sees what their role may see.</Text>
      {problem ? <ErrorPanel problem={problem} /> : null}
      <Row gap={8}>
        {accounts.map((account) => (
          <Button
            key={account.email}
            label={account.roles.map((role) => ROLE_NAMES[role]).join(', ')}
            accessibleLabel={`Enter as ${account.displayName}, ${account.roles.map((role) => ROLE_NAMES[role]).join(', ')}`}
            isBusy={busy === account.email}
            onPress={() => void enter(account)}
          />
        ))}
      </Row>
    </Card>
  );
}
