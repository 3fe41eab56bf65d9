/** One lens model: its landing chart, the chosen row opened, and the formulas that are silent with their reason. */
import { View } from 'react-native';
import { FORMULA_NAMES } from '@/shared/contract';
import type { ModelCalculation, PlanChoice, PlanDesk } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { Mark } from '@/shared/client/components/mark';
import { Text } from '@/shared/client/components/text';
import { formatDecimals } from '@/shared/client/lib/format';
import { SPACE } from '@/shared/client/theme/tokens';
import { CandidateDetail } from './candidate-detail';
import { LandingChart } from './landing-chart';
import { powerStepD } from './power-step';

interface ModelCardProps {
  desk: PlanDesk;
  model: ModelCalculation;
  isBusy: boolean;
  onChoose: (choice: PlanChoice) => void;
}

export function ModelCard({ desk, model, isBusy, onChoose }: ModelCardProps) {
  const { choice, input } = desk.plan;
  const lens = desk.lenses.find((other) => other.id === model.lensId);
  const chosenPowerD = choice?.lensId === model.lensId ? choice.powerD : null;
  const opened = model.candidates.find((row) => row.powerD === chosenPowerD);
  const stepD = powerStepD(lens, opened?.powerD ?? model.candidates[0]?.powerD ?? 20);
  return (
    <Card
      title={model.lensName}
      tone={chosenPowerD === null ? undefined : 'sea'}
      aside={<ExactPowers model={model} />}
    >
      {model.candidates.length === 0 ? (
        <Mark tone="stop" label="No formula gives a result for this lens and eye" />
      ) : (
        <LandingChart
          model={model}
          stepD={stepD}
          targetD={input.targetD}
          toleranceD={input.toleranceD}
          chosenPowerD={chosenPowerD}
          isDisabled={isBusy}
          onChoose={(powerD) => onChoose({ lensId: model.lensId, powerD })}
        />
      )}
      {opened ? <CandidateDetail model={model} candidate={opened} stepD={stepD} /> : null}
      <Silenced model={model} />
      {model.notices.map((notice) => (
        <Text key={`${notice.code} ${notice.message}`} color="ink2">{`▪ ${notice.message}`}</Text>
      ))}
    </Card>
  );
}

/** Power for the target before rounding, by the leading formula. */
function ExactPowers({ model }: { model: ModelCalculation }) {
  const exact = model.exactPowers.find((entry) => entry.formula === model.leadingFormula);
  if (!exact) return null;
  return (
    <Text variant="small" color="ink2" isNumber>{`target power ${formatDecimals(exact.powerD, 2)} D`}</Text>
  );
}

function Silenced({ model }: { model: ModelCalculation }) {
  if (model.silenced.length === 0) return null;
  return (
    <View role="list" aria-label="Formulas without a result" style={{ gap: SPACE.xs }}>
      {model.silenced.map((entry) => (
        <View key={entry.formula} role="listitem">
          <Text>{`${FORMULA_NAMES[entry.formula]} is silent: ${entry.reason}`}</Text>
        </View>
      ))}
    </View>
  );
}
