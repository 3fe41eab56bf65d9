export { SignedInLayout as default } from '@/shared/client/features/shell/signed-in-layout';
