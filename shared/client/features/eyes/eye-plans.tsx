import { View } from 'react-native';
import type { EyeDesk } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { RowLink } from '@/shared/client/components/row-link';
import { Text } from '@/shared/client/components/text';
import { formatDate } from '@/shared/client/lib/format';

/** The plans of this eye, newest first. */
export function EyePlans({ desk }: { desk: EyeDesk }) {
  return (
    <Card title="Plans">
      {desk.plans.length === 0 ? <Text color="ink2">No plan yet.</Text> : null}
      <View role="list">
        {desk.plans.map((plan, index) => (
          <RowLink
            key={plan.id}
            href={{ pathname: '/plans/[planId]', params: { planId: plan.id } }}
            title={`Plan ${plan.sequence}, ${plan.outOfDateReasons.length > 0 ? 'signed, out of date' : plan.status}`}
            detail={`${plan.plainWords}${plan.signedBy ? `. Signed by ${plan.signedBy}, ${formatDate(plan.signedAt)}` : ''}`}
            hasRule={index > 0}
          />
        ))}
      </View>
    </Card>
  );
}
