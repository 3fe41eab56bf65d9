export { LensImportScreen as default } from '@/shared/client/features/lenses/lens-import-screen';
