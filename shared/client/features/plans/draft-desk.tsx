/** The desk of a draft: decisions on the left, candidates in the middle, what stands before the signature. */
import { useState } from 'react';
import { View } from 'react-native';
import type { ModelCalculation, PlanChange, PlanDesk } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { Dialog } from '@/shared/client/components/dialog';
import { FlagList } from '@/shared/client/components/flag-list';
import { Link } from '@/shared/client/components/link';
import { Mark } from '@/shared/client/components/mark';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { queryClient } from '@/shared/client/api/query-client';
import { useLayout } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { ChosenLens } from './chosen-lens';
import { EyeInputs } from './eye-inputs';
import { ModelCard } from './model-card';
import { PlanInputs } from './plan-inputs';
import { SignDialog } from './sign-dialog';
import { planDeskQuery, useChangePlan, useDiscardPlan } from './use-plans';

export function DraftDesk({ desk }: { desk: PlanDesk }) {
  const { isWide } = useLayout();
  const change = useChangePlan(desk);
  const save = (part: Partial<PlanChange>) => change.mutate(part);
  const reload = () => {
    change.reset();
    void queryClient.invalidateQueries({ queryKey: planDeskQuery(desk.plan.id).queryKey });
  };
  const measurement = <EyeInputs desk={desk} />;
  const inputs = <PlanInputs desk={desk} isBusy={change.isPending} onChange={save} />;
  const models = desk.calculation.models.map((model) => (
    <ModelCard
      key={model.lensId}
      desk={desk}
      model={model}
      isBusy={change.isPending}
      onChoose={(choice) => save({ choice })}
    />
  ));
  const decision = (
    <>
      <FlagsCard desk={desk} />
      <SignPanel desk={desk} models={desk.calculation.models} />
    </>
  );
  return (
    <>
      {change.error ? (
        <ErrorPanel
          problem={asProblem(change.error)}
          onRetry={reload}
          kept="The last change was not taken; everything before it was."
        />
      ) : null}
      {isWide ? (
        <View style={{ flexDirection: 'row', gap: SPACE.xl, alignItems: 'stretch' }}>
          <View style={{ width: 340, gap: SPACE.l }}>
            {measurement}
            {inputs}
          </View>
          <View style={{ flex: 1, minWidth: 0, gap: SPACE.l }}>
            {models}
            {decision}
          </View>
        </View>
      ) : (
        // On a phone what is compared comes first; what it was calculated from can wait.
        <View style={{ gap: SPACE.l }}>
          {models}
          {inputs}
          {decision}
          {measurement}
        </View>
      )}
    </>
  );
}

function FlagsCard({ desk }: { desk: PlanDesk }) {
  return (
    <Card title="Flags" aside={<FlagCount desk={desk} />}>
      {desk.calculation.flags.length === 0 ? (
        <Text color="ink2">The checks found nothing to weigh.</Text>
      ) : (
        <FlagList flags={desk.calculation.flags} />
      )}
      <Link
        href={{
          pathname: '/patients/[patientId]/[side]',
          params: { patientId: desk.plan.patientId, side: desk.plan.side },
        }}
        label="Settle flags and history on the eye's page"
      />
    </Card>
  );
}

function FlagCount({ desk }: { desk: PlanDesk }) {
  const open = desk.calculation.flags.filter((flag) => flag.severity === 'stop' && !flag.settlement).length;
  if (open === 0) return <Mark tone="fair" label="no open stop" />;
  return <Mark tone="stop" label={open === 1 ? '1 open stop' : `${open} open stops`} />;
}

function SignPanel({ desk, models }: { desk: PlanDesk; models: readonly ModelCalculation[] }) {
  const [isSigning, setIsSigning] = useState(false);
  const [isDiscarding, setIsDiscarding] = useState(false);
  const discard = useDiscardPlan(desk);
  const canSign = desk.blockers.length === 0;
  return (
    <Card title="Signature" tone="sea">
      <ChosenLens desk={desk} models={models} />
      {canSign ? null : (
        <View role="list" aria-label="What stands before the signature" style={{ gap: SPACE.xs }}>
          <Text variant="strong">Before it can be signed:</Text>
          {desk.blockers.map((blocker) => (
            <View key={blocker} role="listitem">
              <Mark tone="stop" label={blocker} />
            </View>
          ))}
        </View>
      )}
      {discard.error ? <ErrorPanel problem={asProblem(discard.error)} /> : null}
      <Row>
        <Button
          label="Sign this plan"
          kind="primary"
          isDisabled={!canSign}
          onPress={() => setIsSigning(true)}
        />
        <Button label="Discard the draft" kind="danger" onPress={() => setIsDiscarding(true)} />
      </Row>
      {isSigning ? <SignDialog desk={desk} onClose={() => setIsSigning(false)} /> : null}
      <Dialog
        title="Discard this draft?"
        isOpen={isDiscarding}
        onClose={() => setIsDiscarding(false)}
        cancelLabel="Keep it"
        actions={
          <Button label="Discard" kind="danger" isBusy={discard.isPending} onPress={() => discard.mutate()} />
        }
      >
        <Text>{`The draft for the ${desk.plan.side} eye of ${desk.patient.givenName} ${desk.patient.familyName} stays in the audit trail and leaves the lists.`}</Text>
      </Dialog>
    </Card>
  );
}
