export { MeasureScreen as default } from '@/shared/client/features/measurements/measure-screen';
