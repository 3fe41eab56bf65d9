export { EditPatientScreen as default } from '@/shared/client/features/patients/edit-patient-screen';
