export { LensesScreen as default } from '@/shared/client/features/lenses/lenses-screen';
