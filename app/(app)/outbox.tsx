export { OutboxScreen as default } from '@/shared/client/features/accounts/outbox-screen';
