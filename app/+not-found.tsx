export { NotFoundScreen as default } from '@/shared/client/features/shell/not-found-screen';
