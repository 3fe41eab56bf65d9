export { AccountScreen as default } from '@/shared/client/features/accounts/account-screen';
