export { MethodScreen as default } from '@/shared/client/features/method/method-screen';
