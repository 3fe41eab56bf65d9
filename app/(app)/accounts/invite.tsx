export { InviteScreen as default } from '@/shared/client/features/accounts/invite-screen';
