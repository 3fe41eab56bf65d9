export { EyeScreen as default } from '@/shared/client/features/eyes/eye-screen';
