/** The choice in figures: lens, power with its sign, target, where it lands and how surely. */
import { View } from 'react-native';
import type { ModelCalculation, PlanDesk } from '@/shared/contract';
import { Text } from '@/shared/client/components/text';
import { formatChance, formatDioptres, formatPower } from '@/shared/client/lib/format';
import { SPACE } from '@/shared/client/theme/tokens';
import { powerStepD } from './power-step';

export function ChosenLens({ desk, models }: { desk: PlanDesk; models: readonly ModelCalculation[] }) {
  const { choice, input } = desk.plan;
  const model = models.find((candidate) => candidate.lensId === choice?.lensId);
  const candidate = model?.candidates.find((row) => row.powerD === choice?.powerD);
  if (!choice || !model || !candidate) {
    return (
      <Text color="ink2">
        No power chosen yet. Choose one in the chart; the word &ldquo;closest&rdquo; marks the best chance,
        the choice is yours.
      </Text>
    );
  }
  const lens = desk.lenses.find((other) => other.id === choice.lensId);
  return (
    <View style={{ gap: SPACE.xs }}>
      <Text variant="heading">{model.lensName}</Text>
      <Text
        variant="huge"
        isNumber
      >{`${formatPower(choice.powerD, powerStepD(lens, choice.powerD))} D`}</Text>
      <Text>{`Target ${formatDioptres(input.targetD)} D. Lands at ${formatDioptres(candidate.landing.meanD)} D, ${formatChance(candidate.landing.chance)} within ±${input.toleranceD.toFixed(2)} D.`}</Text>
    </View>
  );
}
