export { ImportsScreen as default } from '@/shared/client/features/imports/imports-screen';
