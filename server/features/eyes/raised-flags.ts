/** The flags that the published checks raise for a measured eye. */
export { checkMeasurements as raisedFlags } from '@/shared/clinical/measurement-checks';
