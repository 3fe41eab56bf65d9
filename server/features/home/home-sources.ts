/** What the home page asks of the features, in the order of its sections. Each person sees what they may read. */
import type { Home, Permission } from '@/shared/contract';
import type { Actor } from '@/server/act';
import { invitedAccountsSection } from '@/server/features/accounts/account-home';
import { readyImportsSection } from '@/server/features/imports/import-home';
import { draftsSection, outOfDateSection, signedPlansSection } from '@/server/features/plans/plan-home';

export type HomeSection = Home['sections'][number];

export interface HomeSource {
  permission: Permission;
  /** `at` is the ISO moment that counts as now. */
  load(actor: Actor, at: string): Promise<HomeSection>;
}

export const HOME_SOURCES: readonly HomeSource[] = [
  { permission: 'measurement.write', load: readyImportsSection },
  { permission: 'plan.write', load: draftsSection },
  { permission: 'plan.write', load: outOfDateSection },
  { permission: 'plan.read', load: signedPlansSection },
  { permission: 'account.manage', load: invitedAccountsSection },
];
