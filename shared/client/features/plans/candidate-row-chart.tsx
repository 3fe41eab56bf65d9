/**
 * The picture of one candidate power: its hill, the bar from the lowest to the highest formula, a mark per
 * formula, the target line and the tolerance band. Decorative for a screen reader: the row's label and the
 * table say the same in words.
 */
import Svg, { G, Line, Path, Rect } from 'react-native-svg';
import type { Candidate, Prediction } from '@/shared/contract';
import type { FormulaId } from '@/formulas';
import { useTheme } from '@/shared/client/theme/theme-context';
import { FormulaMark } from './formula-mark';
import { hillPath, isOnAxis } from './landing-geometry';
import type { RefractionScale } from './landing-geometry';

export interface CandidateRowChartProps {
  candidate: Candidate;
  scale: RefractionScale;
  widthPx: number;
  targetD: number;
  toleranceD: number;
  narrowestSdD: number;
  leadingFormula: FormulaId | null;
  isChosen: boolean;
}

export const ROW_CHART_HEIGHT_PX = 52;
const BASELINE_PX = 38;
const MARK_Y_PX = 44;
const HILL_HEIGHT_PX = 32;

export function CandidateRowChart(props: CandidateRowChartProps) {
  const { candidate, scale, widthPx, targetD, toleranceD, isChosen } = props;
  const { colors } = useTheme();
  const hill = hillPath(candidate.landing, scale, {
    baselinePx: BASELINE_PX,
    heightPx: HILL_HEIGHT_PX,
    narrowestSdD: props.narrowestSdD,
  });
  const band = {
    from: scale.x(Math.max(targetD - toleranceD, scale.minD)),
    to: scale.x(Math.min(targetD + toleranceD, scale.maxD)),
  };
  const bar = {
    from: scale.x(Math.max(candidate.lowestD, scale.minD)),
    to: scale.x(Math.min(candidate.highestD, scale.maxD)),
  };
  return (
    <Svg width={widthPx} height={ROW_CHART_HEIGHT_PX} aria-hidden>
      <Rect
        x={band.from}
        y={0}
        width={Math.max(band.to - band.from, 0)}
        height={ROW_CHART_HEIGHT_PX}
        fill={colors.rust}
        opacity={0.1}
      />
      <Path d={hill} fill={isChosen ? colors.sea : colors.ink2} opacity={isChosen ? 0.55 : 0.28} />
      <Line
        x1={0}
        x2={widthPx}
        y1={BASELINE_PX}
        y2={BASELINE_PX}
        stroke={colors.line}
        strokeWidth={1}
        opacity={0.6}
      />
      <Line
        x1={scale.x(targetD)}
        x2={scale.x(targetD)}
        y1={0}
        y2={ROW_CHART_HEIGHT_PX}
        stroke={colors.rust}
        strokeWidth={2}
      />
      {bar.to > bar.from ? (
        <Line x1={bar.from} x2={bar.to} y1={MARK_Y_PX} y2={MARK_Y_PX} stroke={colors.ink2} strokeWidth={2} />
      ) : null}
      <G>
        {leadingLast(candidate.predictions, props.leadingFormula)
          .filter((prediction) => isOnAxis(scale, prediction.refractionD))
          .map((prediction) => (
            <FormulaMark
              key={prediction.formula}
              formula={prediction.formula}
              xPx={scale.x(prediction.refractionD)}
              yPx={MARK_Y_PX}
              colour={colors.ink}
              paper={colors.surface}
              isLeading={prediction.formula === props.leadingFormula}
            />
          ))}
      </G>
    </Svg>
  );
}

/** Drawn last, the leading formula's mark is never hidden under another. */
function leadingLast(predictions: readonly Prediction[], leading: FormulaId | null): Prediction[] {
  return [...predictions].sort((a, b) => Number(a.formula === leading) - Number(b.formula === leading));
}
