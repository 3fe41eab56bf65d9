import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { paths } from '@/shared/contract';
import { callEmpty } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Stack } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { Link } from '@/shared/client/components/link';
import { ErrorPanel, SuccessNote } from '@/shared/client/components/states';
import { Entrance } from './entrance';

export function ForgotPasswordScreen() {
  const [email, setEmail] = useState('');
  const request = useMutation({
    mutationFn: () => callEmpty(paths.passwordReset(), { method: 'POST', body: { email } }),
  });
  return (
    <Entrance
      title="Set a new password"
      lead="We send a link to the address of your account. It works once, for an hour."
    >
      <Stack>
        {request.error ? <ErrorPanel problem={asProblem(request.error)} /> : null}
        {request.isSuccess ? (
          <SuccessNote text="If an account has this address, a mail is on its way." />
        ) : (
          <>
            <TextField
              label="E-mail"
              type="email"
              autoComplete="username"
              value={email}
              onChange={setEmail}
              onSubmit={() => request.mutate()}
              isRequired
            />
            <Button
              label="Send the link"
              kind="primary"
              isBusy={request.isPending}
              onPress={() => request.mutate()}
              isWide
            />
          </>
        )}
        <Link href="/sign-in" label="Back to sign-in" />
      </Stack>
    </Entrance>
  );
}
