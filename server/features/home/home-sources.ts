/** What the home page asks of the features, in the order of its sections. Each person sees what they may read. */
import type { Home, Permission } from '@/shared/contract';
import type { Actor } from '@/server/act';
import { invitedAccountsSection } from '@/server/features/accounts/account-home';
import { readyImportsSection } from '@/server/features/imports/import-home';

export type HomeSection = Home['sections'][number];

export interface HomeSource {
  permission: Permission;
  load(actor: Actor): Promise<HomeSection>;
}

export const HOME_SOURCES: readonly HomeSource[] = [
  { permission: 'measurement.write', load: readyImportsSection },
  { permission: 'account.manage', load: invitedAccountsSection },
];
