export { LensScreen as default } from '@/shared/client/features/lenses/lens-screen';
