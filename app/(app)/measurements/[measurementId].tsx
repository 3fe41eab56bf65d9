export { MeasurementScreen as default } from '@/shared/client/features/measurements/measurement-screen';
