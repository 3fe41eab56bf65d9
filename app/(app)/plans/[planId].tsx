export { PlanDeskScreen as default } from '@/shared/client/features/plans/plan-desk-screen';
