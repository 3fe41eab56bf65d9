/** A signed plan: large and plain, with everything it was signed on. Nothing here can be changed. */
import { useState } from 'react';
import { View } from 'react-native';
import { router } from 'expo-router';
import { hasPermission, paths } from '@/shared/contract';
import type { PlanDesk } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { FlagList } from '@/shared/client/components/flag-list';
import { Mark } from '@/shared/client/components/mark';
import { SideWords } from '@/shared/client/components/patient-strip';
import { ErrorPanel } from '@/shared/client/components/states';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import type { ApiProblem } from '@/shared/client/api/problem';
import { downloadFile } from '@/shared/client/lib/download';
import { formatInstant } from '@/shared/client/lib/format';
import { useLayout } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { CandidateDetail } from './candidate-detail';
import { ChosenLens } from './chosen-lens';
import { EyeInputs } from './eye-inputs';
import { powerStepD } from './power-step';
import { useStartPlan } from './use-plans';

export function SignedPlan({ desk }: { desk: PlanDesk }) {
  const { isWide } = useLayout();
  const { plan } = desk;
  return (
    <>
      {plan.outOfDateReasons.length > 0 ? <OutOfDate reasons={plan.outOfDateReasons} /> : null}
      <View style={{ flexDirection: isWide ? 'row' : 'column', gap: SPACE.xl }}>
        <View style={{ flex: isWide ? 1 : undefined, minWidth: 0, gap: SPACE.l }}>
          <Card tone="sea" label="Signed choice">
            <SideWords side={plan.side} variant="title" />
            <ChosenLens desk={desk} models={desk.calculation.models} />
            <PlanActions desk={desk} />
          </Card>
          <SignedCalculation desk={desk} />
        </View>
        <View style={isWide ? { width: 360, gap: SPACE.l } : { gap: SPACE.l }}>
          <EyeInputs desk={desk} />
          <SignatureFacts desk={desk} />
        </View>
      </View>
    </>
  );
}

function SignedCalculation({ desk: { plan, calculation, lenses } }: { desk: PlanDesk }) {
  const model = calculation.models.find((candidate) => candidate.lensId === plan.choice?.lensId);
  const candidate = model?.candidates.find((row) => row.powerD === plan.choice?.powerD);
  const lens = lenses.find((other) => other.id === plan.choice?.lensId);
  return (
    <>
      {model && candidate ? (
        <Card title="How it was calculated">
          <CandidateDetail model={model} candidate={candidate} stepD={powerStepD(lens, candidate.powerD)} />
        </Card>
      ) : null}
      {calculation.flags.length > 0 ? (
        <Card title="Flags when it was signed">
          <FlagList flags={calculation.flags} />
        </Card>
      ) : null}
    </>
  );
}

function SignatureFacts({ desk: { plan } }: { desk: PlanDesk }) {
  return (
    <Card title="Signature">
      <Facts
        items={[
          { label: 'Signed by', value: plan.signedBy ?? '—' },
          { label: 'At', value: formatInstant(plan.signedAt) },
          { label: 'Plan number', value: String(plan.sequence), isNumber: true },
          { label: 'Note', value: plan.input.note || '—' },
        ]}
      />
      <Text variant="small" color="ink2">
        Digest of everything signed:
      </Text>
      <Text variant="small" isNumber style={{ overflowWrap: 'anywhere' } as object}>
        {plan.digest ?? '—'}
      </Text>
    </Card>
  );
}

function OutOfDate({ reasons }: { reasons: readonly string[] }) {
  return (
    <Card tone="stop" label="Out of date">
      <Mark tone="stop" label="This plan is out of date: it needs a new signature" />
      {reasons.map((reason) => (
        <Text key={reason}>{`▪ ${reason}`}</Text>
      ))}
    </Card>
  );
}

function PlanActions({ desk }: { desk: PlanDesk }) {
  const { roles } = useUser();
  const [problem, setProblem] = useState<ApiProblem>();
  const start = useStartPlan();
  const canPlan = hasPermission(roles, 'plan.write');
  const print = (paper: 'a4' | 'letter') => {
    setProblem(undefined);
    downloadFile(`${paths.planSheet(desk.plan.id)}?paper=${paper}`).catch((error: unknown) =>
      setProblem(asProblem(error)),
    );
  };
  const replan = () =>
    start.mutate(
      { patientId: desk.plan.patientId, side: desk.plan.side },
      { onSuccess: (next) => router.push({ pathname: '/plans/[planId]', params: { planId: next.plan.id } }) },
    );
  const shown = problem ?? (start.error ? asProblem(start.error) : undefined);
  return (
    <>
      {shown ? <ErrorPanel problem={shown} /> : null}
      <Row>
        <Button label="Plan sheet, A4" kind="primary" onPress={() => print('a4')} />
        <Button label="Plan sheet, Letter" onPress={() => print('letter')} />
        {canPlan && desk.plan.status === 'signed' ? (
          <Button label="Plan this eye again" isBusy={start.isPending} onPress={replan} />
        ) : null}
      </Row>
    </>
  );
}
