/** The ground of the entrance: depth lines along a coast and a course that ends there. Ornament, nothing to read. */
import { StyleSheet } from 'react-native';
import Svg, { Circle, Path } from 'react-native-svg';
import { curveBasis, line } from 'd3-shape';
import { useTheme } from '@/shared/client/theme/theme-context';

const BOX = { width: 1440, height: 900 };
const STEP = 45;
/** Distances of the depth lines from the coast, closer together near the shore. */
const DEPTH_LINES = [24, 56, 94, 138] as const;
const LANDING_Y = 800;

export function ChartGround() {
  const { colors } = useTheme();
  return (
    <Svg
      style={[StyleSheet.absoluteFill, { pointerEvents: 'none' }]}
      width="100%"
      height="100%"
      viewBox={`0 0 ${BOX.width} ${BOX.height}`}
      preserveAspectRatio="xMaxYMid slice"
      aria-hidden
    >
      <Path d={LAND} fill={colors.surface} opacity={0.6} />
      {DEPTH_LINES.map((distance) => (
        <Path key={distance} d={shoreAt(distance)} fill="none" stroke={colors.hairline} strokeWidth={1.2} />
      ))}
      <Path d={shoreAt(0)} fill="none" stroke={colors.line} strokeWidth={1.4} />
      <Path d={COURSE} fill="none" stroke={colors.rust} strokeWidth={1.6} strokeDasharray="10 7" />
      <Circle
        cx={coastX(LANDING_Y)}
        cy={LANDING_Y}
        r={5}
        fill={colors.paper}
        stroke={colors.rust}
        strokeWidth={2}
      />
    </Svg>
  );
}

/** Where the coast lies at this height: bays and headlands. */
function coastX(y: number): number {
  return 1225 + 75 * Math.sin(y / 165 + 0.6) + 34 * Math.sin(y / 61 + 1.1);
}

function shoreAt(distance: number): string {
  // Farther out the lines forget the small bays.
  const x = (y: number) => coastX(y) - distance * (1 + 0.22 * Math.sin(y / 140 + distance / 45));
  const rows = Array.from({ length: BOX.height / STEP + 5 }, (_, index) => (index - 2) * STEP);
  return line<number>(x, (y) => y).curve(curveBasis)(rows) ?? '';
}

const LAND = `${shoreAt(0)} L${BOX.width + 80} ${BOX.height + 90} L${BOX.width + 80} -90 Z`;
const COURSE = `M-20 868 C 380 878 780 874 ${coastX(LANDING_Y) - 6} ${LANDING_Y + 2}`;
