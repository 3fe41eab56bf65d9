export { RootLayout as default } from '@/shared/client/features/shell/root-layout';
export { RouteErrorBoundary as ErrorBoundary } from '@/shared/client/features/shell/route-error-boundary';
