export { HomeScreen as default } from '@/shared/client/features/home/home-screen';
