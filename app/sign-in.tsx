export { SignInScreen as default } from '@/shared/client/features/auth/sign-in-screen';
