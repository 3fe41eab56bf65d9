export { PatientScreen as default } from '@/shared/client/features/patients/patient-screen';
