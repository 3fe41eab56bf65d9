export { AuditScreen as default } from '@/shared/client/features/accounts/audit-screen';
