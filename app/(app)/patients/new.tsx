export { NewPatientScreen as default } from '@/shared/client/features/patients/new-patient-screen';
