export { SetPasswordScreen as default } from '@/shared/client/features/auth/set-password-screen';
