export { PatientsScreen as default } from '@/shared/client/features/patients/patients-screen';
