/** One eye: where it stands, what is known of it, what was measured, what the checks found, its plans. */
import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { View } from 'react-native';
import { hasPermission, sideSchema } from '@/shared/contract';
import type { EyeDesk, EyeStage } from '@/shared/contract';
import { useUser } from '@/shared/client/api/session-store';
import { Card, Row } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { PatientStrip } from '@/shared/client/components/patient-strip';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { StageMark } from '@/shared/client/components/stage-mark';
import { EmptyState } from '@/shared/client/components/states';
import { sideWords } from '@/shared/client/lib/format';
import { eyeQuery } from '@/shared/client/features/patients/use-patients';
import { useLayout } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { EyeFlags } from './eye-flags';
import { EyeMeasurements } from './eye-measurements';
import { EyePlans } from './eye-plans';
import { HistoryCard } from './history-card';
import { StartPlanButton } from './start-plan-button';

export function EyeScreen() {
  const params = useLocalSearchParams<{ patientId: string; side: string }>();
  const side = sideSchema.safeParse(params.side).data;
  const query = useQuery({ ...eyeQuery(params.patientId, side ?? 'right'), enabled: side !== undefined });
  const desk = query.data;
  if (!side) {
    return (
      <Screen title="No such eye" back="/patients">
        <EmptyState title="No such eye" hint="An eye is right or left. Open the patient and choose." />
      </Screen>
    );
  }
  return (
    <Screen
      title={sideWords(side)}
      back={{ pathname: '/patients/[patientId]', params: { patientId: params.patientId } }}
      strip={desk ? <PatientStrip patient={desk.patient} side={side} /> : undefined}
      width="full"
    >
      <QueryView query={query}>{(loaded) => <EyeBody desk={loaded} />}</QueryView>
    </Screen>
  );
}

function EyeBody({ desk }: { desk: EyeDesk }) {
  const { isWide } = useLayout();
  return (
    <>
      <NextStep desk={desk} />
      <View style={{ flexDirection: isWide ? 'row' : 'column', gap: SPACE.xl, alignItems: 'stretch' }}>
        <View style={{ flex: isWide ? 1 : undefined, minWidth: 0, gap: SPACE.l }}>
          <EyeFlags desk={desk} />
          <EyePlans desk={desk} />
        </View>
        <View style={{ flex: isWide ? 1 : undefined, minWidth: 0, gap: SPACE.l }}>
          <HistoryCard key={desk.eye.version} desk={desk} />
          <EyeMeasurements desk={desk} />
        </View>
      </View>
    </>
  );
}

/** The one thing to decide: what this eye waits for, and the act that does it. */
function NextStep({ desk }: { desk: EyeDesk }) {
  const { roles } = useUser();
  const address = { patientId: desk.patient.id, side: desk.eye.side };
  const canMeasure = hasPermission(roles, 'measurement.write');
  const canPlan = hasPermission(roles, 'plan.write') && desk.measurements.length > 0;
  return (
    <Card tone="sea" label="Where this eye stands">
      <StageMark stage={desk.stage as EyeStage} words={desk.waitsFor} />
      <Row>
        {canMeasure ? (
          <Link
            href={{ pathname: '/patients/[patientId]/[side]/measure', params: address }}
            label="Enter a measurement"
            kind="button"
          />
        ) : null}
        {canPlan ? (
          <StartPlanButton {...address} hasDraft={desk.plans.some((plan) => plan.status === 'draft')} />
        ) : null}
        <Link
          href={{
            pathname: '/patients/[patientId]/[side]',
            params: { patientId: desk.patient.id, side: desk.fellowEye.side },
          }}
          label={`To the ${desk.fellowEye.side} eye`}
        />
      </Row>
    </Card>
  );
}
