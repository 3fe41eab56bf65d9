/**
 * A mark of its own shape for each formula, so that they can be told apart without colour.
 */
import { Circle, Path, Rect } from 'react-native-svg';
import type { FormulaId } from '@/formulas';

interface FormulaMarkProps {
  formula: FormulaId;
  xPx: number;
  yPx: number;
  colour: string;
  paper: string;
  isLeading: boolean;
}

const HALF_PX = 4.5;

/** SRK/T disc, T2 ring, Holladay 1 square, Hoffer Q triangle, Haigis diamond. The leading formula's is larger. */
export function FormulaMark({ formula, xPx, yPx, colour, paper, isLeading }: FormulaMarkProps) {
  const half = isLeading ? HALF_PX + 1.5 : HALF_PX;
  const outline = { stroke: paper, strokeWidth: 1 };
  switch (formula) {
    case 'srkt':
      return <Circle cx={xPx} cy={yPx} r={half} fill={colour} {...outline} />;
    case 't2':
      return <Circle cx={xPx} cy={yPx} r={half - 1} fill={paper} stroke={colour} strokeWidth={2} />;
    case 'holladay1':
      return (
        <Rect
          x={xPx - half + 0.5}
          y={yPx - half + 0.5}
          width={2 * half - 1}
          height={2 * half - 1}
          fill={colour}
          {...outline}
        />
      );
    case 'hofferQ':
      return (
        <Path
          d={`M ${xPx} ${yPx - half} L ${xPx + half} ${yPx + half} L ${xPx - half} ${yPx + half} Z`}
          fill={colour}
          {...outline}
        />
      );
    case 'haigis':
      return (
        <Path
          d={`M ${xPx} ${yPx - half - 1} L ${xPx + half} ${yPx} L ${xPx} ${yPx + half + 1} L ${xPx - half} ${yPx} Z`}
          fill={colour}
          {...outline}
        />
      );
  }
}
