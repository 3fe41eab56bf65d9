import { router, useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { sideSchema } from '@/shared/contract';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { eyeQuery } from '@/shared/client/features/patients/use-patients';
import { MeasureForm } from './measure-form';

/** Entering a measurement by hand, with the same rules as a file. */
export function MeasureScreen() {
  const params = useLocalSearchParams<{ patientId: string; side: string }>();
  const side = sideSchema.parse(params.side);
  const query = useQuery(eyeQuery(params.patientId, side));
  const address = { patientId: params.patientId, side };
  const leave = () => router.replace({ pathname: '/patients/[patientId]/[side]', params: address });
  return (
    <Screen
      title={`Measurement of the ${side} eye`}
      lead="Typed by hand: have a second person compare it with the printout."
      back={{ pathname: '/patients/[patientId]/[side]', params: address }}
      strip={query.data ? <PatientStrip patient={query.data.patient} side={side} /> : undefined}
      width="reading"
    >
      <QueryView query={query}>{(desk) => <MeasureForm desk={desk} onDone={leave} />}</QueryView>
    </Screen>
  );
}
