export { PlansScreen as default } from '@/shared/client/features/plans/plans-screen';
