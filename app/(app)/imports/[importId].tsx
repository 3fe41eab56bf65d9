export { ImportScreen as default } from '@/shared/client/features/imports/import-screen';
