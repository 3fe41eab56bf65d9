/** Disabling names the person and what follows, and asks once more; enabling again harms nobody. */
import { useState } from 'react';
import type { Account } from '@/shared/contract';
import { Button } from '@/shared/client/components/button';
import { Dialog } from '@/shared/client/components/dialog';
import { Text } from '@/shared/client/components/text';

interface StatusChangeProps {
  account: Account;
  onChange: (status: Account['status']) => void;
}

export function StatusChange({ account, onChange }: StatusChangeProps) {
  const [isAsking, setIsAsking] = useState(false);
  if (account.status === 'disabled')
    return <Button label="Enable again" onPress={() => onChange('active')} />;
  if (account.status !== 'active') return null;
  const disable = () => {
    setIsAsking(false);
    onChange('disabled');
  };
  return (
    <>
      <Button label="Disable this account" kind="danger" onPress={() => setIsAsking(true)} />
      <Dialog
        title={`Disable the account of ${account.displayName}?`}
        isOpen={isAsking}
        onClose={() => setIsAsking(false)}
        cancelLabel="Leave it active"
        actions={<Button label="Disable" kind="danger" onPress={disable} />}
      >
        <Text>{`${account.displayName} is signed out everywhere at once and cannot sign in again.`}</Text>
        <Text color="ink2">
          What they recorded and signed stays under their name. The account can be enabled again.
        </Text>
      </Dialog>
    </>
  );
}
