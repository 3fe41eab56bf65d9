export { NewLensScreen as default } from '@/shared/client/features/lenses/new-lens-screen';
