/** One candidate power: its power, its picture, its chance of landing; the whole row is the button. */
import { View } from 'react-native';
import type { Candidate } from '@/shared/contract';
import { RowButton } from '@/shared/client/components/row-button';
import { Text } from '@/shared/client/components/text';
import { formatChance, formatDioptres, formatPower } from '@/shared/client/lib/format';
import { useLayout } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { CandidateRowChart } from './candidate-row-chart';
import type { CandidateRowChartProps } from './candidate-row-chart';

interface CandidateRowProps {
  picture: CandidateRowChartProps;
  stepD: number;
  columns: { powerPx: number; chancePx: number };
  isTabStop: boolean;
  isDisabled: boolean;
  onChoose: () => void;
  onStep: (step: 1 | -1) => void;
  setElement: (element: View | null) => void;
}

export function CandidateRow({ picture, stepD, columns, ...row }: CandidateRowProps) {
  const { isPhone } = useLayout();
  const { candidate, isChosen, toleranceD } = picture;
  const power = (
    <View style={{ width: isPhone ? undefined : columns.powerPx, gap: 2 }}>
      <Text
        variant="large"
        isNumber
        color={isChosen ? 'sea' : 'ink'}
        style={{ fontWeight: isChosen ? '600' : '400' }}
      >
        {formatPower(candidate.powerD, stepD)}
      </Text>
      <RowWords isChosen={isChosen} isClosest={candidate.isClosest} />
    </View>
  );
  const chance = (
    <View style={{ width: isPhone ? undefined : columns.chancePx, alignItems: 'flex-end', gap: 2 }}>
      <Text variant="large" isNumber>
        {formatChance(candidate.landing.chance)}
      </Text>
      <Text variant="small" color="ink2" isNumber>
        {`${formatDioptres(candidate.landing.meanD)} D`}
      </Text>
    </View>
  );
  return (
    <RowButton
      label={rowLabel(candidate, stepD, toleranceD)}
      isPressed={isChosen}
      {...row}
      onPress={row.onChoose}
    >
      {isPhone ? (
        <View style={{ gap: SPACE.xs, paddingVertical: SPACE.s }}>
          <View style={{ flexDirection: 'row', justifyContent: 'space-between' }}>
            {power}
            {chance}
          </View>
          <CandidateRowChart {...picture} />
        </View>
      ) : (
        <View style={{ flexDirection: 'row', alignItems: 'center' }}>
          {power}
          <CandidateRowChart {...picture} />
          {chance}
        </View>
      )}
    </RowButton>
  );
}

function RowWords({ isChosen, isClosest }: { isChosen: boolean; isClosest: boolean }) {
  const words = [isChosen ? 'chosen' : '', isClosest ? 'closest' : ''].filter(Boolean).join(', ');
  if (!words) return null;
  return (
    <Text variant="small" color={isChosen ? 'sea' : 'ink2'}>
      {words}
    </Text>
  );
}

/** The row in words, for who cannot see the picture. */
export function rowLabel(candidate: Candidate, stepD: number, toleranceD: number): string {
  const { landing, lowestD, highestD } = candidate;
  return [
    `Power ${formatPower(candidate.powerD, stepD)} dioptres`,
    `lands at ${formatDioptres(landing.meanD)}`,
    `${formatChance(landing.chance)} within ${toleranceD.toFixed(2)} of the target`,
    `formulas from ${formatDioptres(lowestD)} to ${formatDioptres(highestD)}`,
    ...(candidate.isClosest ? ['closest'] : []),
  ].join(', ');
}
