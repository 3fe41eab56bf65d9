export { AccountsScreen as default } from '@/shared/client/features/accounts/accounts-screen';
