export { AboutScreen as default } from '@/shared/client/features/about/about-screen';
