import type { Home } from '@/shared/contract';
import { listInvited } from './account.repository';

/** For the administrator: who has not set a password yet. */
export async function invitedAccountsSection(): Promise<Home['sections'][number]> {
  const invited = await listInvited();
  return {
    id: 'invited-accounts',
    title: 'Invitations not taken up yet',
    emptyHint: 'Everybody who was invited has set a password. Invite people under Accounts.',
    total: invited.length,
    items: invited.map(({ displayName, email }) => ({
      title: displayName,
      detail: email,
      href: '/accounts',
      side: null,
    })),
  };
}
