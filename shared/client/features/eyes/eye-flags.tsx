/** What the checks found; stops are settled here, by name and with a reason. */
import { useState } from 'react';
import { hasPermission } from '@/shared/contract';
import type { EyeDesk, Flag } from '@/shared/contract';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Card } from '@/shared/client/components/card';
import { FlagList } from '@/shared/client/components/flag-list';
import { Link } from '@/shared/client/components/link';
import { Text } from '@/shared/client/components/text';
import { SettleDialog } from './settle-dialog';

export function EyeFlags({ desk }: { desk: EyeDesk }) {
  const { roles } = useUser();
  const [settling, setSettling] = useState<Flag>();
  const canSettle = hasPermission(roles, 'flag.settle');
  const actionFor = (flag: Flag) =>
    canSettle && flag.severity === 'stop' && flag.canBeSettled && !flag.settlement ? (
      <Button label="Settle this stop" onPress={() => setSettling(flag)} />
    ) : null;
  return (
    <Card title="Checks">
      {desk.measurements.length === 0 ? (
        <Text color="ink2">The checks run when there is a measurement.</Text>
      ) : null}
      {desk.measurements.length > 0 && desk.flags.length === 0 ? (
        <Text color="ink2">The checks found nothing to weigh.</Text>
      ) : null}
      <Link href="/method" label="Where these checks come from" />
      <FlagList flags={desk.flags} actionFor={actionFor} />
      {settling ? <SettleDialog desk={desk} flag={settling} onClose={() => setSettling(undefined)} /> : null}
    </Card>
  );
}
