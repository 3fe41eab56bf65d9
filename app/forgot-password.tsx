export { ForgotPasswordScreen as default } from '@/shared/client/features/auth/forgot-password-screen';
