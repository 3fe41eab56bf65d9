/** The x axis above the rows: ticks with signed dioptres, the target named on its line. */
import Svg, { G, Line, Text as SvgText } from 'react-native-svg';
import { useTheme } from '@/shared/client/theme/theme-context';
import { formatDioptres } from '@/shared/client/lib/format';
import type { RefractionScale } from './landing-geometry';

const HEIGHT_PX = 40;
const HALF_LABEL_PX = 18;

export function RefractionAxis({
  scale,
  widthPx,
  targetD,
}: {
  scale: RefractionScale;
  widthPx: number;
  targetD: number;
}) {
  const { colors, fonts } = useTheme();
  const isAtEdge = (tickD: number) =>
    scale.x(tickD) < HALF_LABEL_PX || scale.x(tickD) > widthPx - HALF_LABEL_PX;
  const isNearTarget = (tickD: number) => Math.abs(scale.x(tickD) - scale.x(targetD)) < 34;
  return (
    <Svg width={widthPx} height={HEIGHT_PX} aria-hidden>
      <SvgText
        x={clampLabel(scale.x(targetD), widthPx)}
        y={12}
        fontSize={13}
        textAnchor="middle"
        fill={colors.rust}
        fontFamily={fonts.words}
      >
        {`target ${formatDioptres(targetD)} D`}
      </SvgText>
      {scale.ticksD.map((tickD) => (
        <G key={tickD}>
          <Line
            x1={scale.x(tickD)}
            x2={scale.x(tickD)}
            y1={HEIGHT_PX - 5}
            y2={HEIGHT_PX}
            stroke={colors.line}
            strokeWidth={1}
          />
          {isAtEdge(tickD) || (isNearTarget(tickD) && tickD !== targetD) ? null : (
            <SvgText
              x={scale.x(tickD)}
              y={HEIGHT_PX - 9}
              fontSize={13}
              textAnchor="middle"
              fill={colors.ink2}
              fontFamily={fonts.numbers}
            >
              {formatDioptres(tickD).replace(/0$/, '')}
            </SvgText>
          )}
        </G>
      ))}
      <Line
        x1={scale.x(targetD)}
        x2={scale.x(targetD)}
        y1={17}
        y2={HEIGHT_PX}
        stroke={colors.rust}
        strokeWidth={2}
      />
    </Svg>
  );
}

/** Keeps a centred label inside the picture. */
function clampLabel(xPx: number, widthPx: number, halfPx = 48): number {
  return Math.min(Math.max(xPx, halfPx), widthPx - halfPx);
}
