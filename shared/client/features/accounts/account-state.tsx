import type { Account } from '@/shared/contract';
import { Mark, Tag } from '@/shared/client/components/mark';

export function AccountState({ status }: { status: Account['status'] }) {
  if (status === 'active') return <Mark tone="fair" label="active" />;
  return status === 'invited' ? (
    <Tag label="invited, not yet come" color="rust" />
  ) : (
    <Tag label="disabled" color="stop" />
  );
}
