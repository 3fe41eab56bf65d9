export { StartRedirect as default } from '@/shared/client/features/shell/start-redirect';
