/**
 * The landing chart: one row per power, from higher to lower. Arrow keys move between rows, Enter or Space
 * chooses. What the picture shows stands in each row's label and, for the chosen row, in a table below.
 */
import { useRef, useState } from 'react';
import { View } from 'react-native';
import type { Candidate, ModelCalculation } from '@/shared/contract';
import { Text } from '@/shared/client/components/text';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { ROW_EDGE_PX } from '@/shared/client/components/row-button';
import { CandidateRow } from './candidate-row';
import { FormulaLegend } from './formula-legend';
import { refractionScale } from './landing-geometry';
import { RefractionAxis } from './refraction-axis';

interface LandingChartProps {
  model: ModelCalculation;
  stepD: number;
  targetD: number;
  toleranceD: number;
  chosenPowerD: number | null;
  isDisabled: boolean;
  onChoose: (powerD: number) => void;
}

const POWER_COLUMN_PX = 96;
const CHANCE_COLUMN_PX = 132;

export function LandingChart(props: LandingChartProps) {
  const { model, targetD, toleranceD, chosenPowerD } = props;
  const { colors } = useTheme();
  const { isPhone } = useLayout();
  const [widthPx, setWidthPx] = useState(0);
  const rows = useRef<(View | null)[]>([]);
  const chartPx = Math.max(widthPx - ROW_EDGE_PX - (isPhone ? 0 : POWER_COLUMN_PX + CHANCE_COLUMN_PX), 120);
  const scale = refractionScale(model.candidates, targetD, chartPx);
  const narrowestSdD = Math.min(...model.candidates.map((candidate) => candidate.landing.sdD));
  const focusRow = (index: number) =>
    (rows.current[index] as unknown as { focus?: () => void } | null)?.focus?.();
  const tabStop = Math.max(
    model.candidates.findIndex((c) => c.powerD === chosenPowerD),
    model.candidates.findIndex((c) => c.isClosest),
    0,
  );
  const pictureOf = (candidate: Candidate) => ({
    candidate,
    scale,
    widthPx: chartPx,
    targetD,
    toleranceD,
    narrowestSdD,
    leadingFormula: model.leadingFormula,
    isChosen: candidate.powerD === chosenPowerD,
  });
  return (
    <View onLayout={(event) => setWidthPx(event.nativeEvent.layout.width)} style={{ gap: SPACE.s }}>
      <FormulaLegend
        formulas={model.candidates[0]?.predictions.map((p) => p.formula) ?? []}
        leading={model.leadingFormula}
      />
      {widthPx > 0 ? (
        <View>
          <View style={{ flexDirection: 'row', alignItems: 'flex-end', paddingLeft: ROW_EDGE_PX }}>
            {isPhone ? null : <ColumnTitle widthPx={POWER_COLUMN_PX} title="Lens power (D)" />}
            <RefractionAxis scale={scale} widthPx={chartPx} targetD={targetD} />
            {isPhone ? null : (
              <ColumnTitle
                widthPx={CHANCE_COLUMN_PX}
                title={`Lands within ±${toleranceD.toFixed(2)} D`}
                isRight
              />
            )}
          </View>
          <View
            role="group"
            aria-label={`Candidate powers of ${model.lensName}`}
            style={{ borderTopWidth: 1, borderTopColor: colors.line }}
          >
            {model.candidates.map((candidate, index) => (
              <CandidateRow
                key={candidate.powerD}
                picture={pictureOf(candidate)}
                stepD={props.stepD}
                columns={{ powerPx: POWER_COLUMN_PX, chancePx: CHANCE_COLUMN_PX }}
                isTabStop={index === tabStop}
                isDisabled={props.isDisabled}
                onChoose={() => props.onChoose(candidate.powerD)}
                onStep={(step) => focusRow(index + step)}
                setElement={(element) => {
                  rows.current[index] = element;
                }}
              />
            ))}
          </View>
        </View>
      ) : null}
    </View>
  );
}

function ColumnTitle({
  widthPx,
  title,
  isRight = false,
}: {
  widthPx: number;
  title: string;
  isRight?: boolean;
}) {
  return (
    <View style={{ width: widthPx, paddingBottom: SPACE.xs }}>
      <Text variant="small" color="ink2" align={isRight ? 'right' : 'left'}>
        {title}
      </Text>
    </View>
  );
}
