/** Sends the invitation once more, to somebody who has not come yet. */
import { useMutation } from '@tanstack/react-query';
import { paths } from '@/shared/contract';
import type { Account } from '@/shared/contract';
import { callEmpty } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Stack } from '@/shared/client/components/card';
import { ErrorPanel, SuccessNote } from '@/shared/client/components/states';

export function InvitationAgain({ account }: { account: Account }) {
  const send = useMutation({
    mutationFn: () => callEmpty(paths.accountInvitation(account.id), { method: 'POST' }),
  });
  return (
    <Stack>
      {send.error ? <ErrorPanel problem={asProblem(send.error)} /> : null}
      {send.isSuccess ? <SuccessNote text="The invitation is on its way again" /> : null}
      <Button label="Send the invitation again" isBusy={send.isPending} onPress={() => send.mutate()} />
    </Stack>
  );
}
