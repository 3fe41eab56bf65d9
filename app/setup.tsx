export { SetupScreen as default } from '@/shared/client/features/auth/setup-screen';
