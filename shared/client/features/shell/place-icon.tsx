import Svg, { Path } from 'react-native-svg';

/** A place's sign, drawn in one line like the symbols of a chart. */
export function PlaceIcon({ path, colour, sizePx = 24 }: { path: string; colour: string; sizePx?: number }) {
  return (
    <Svg width={sizePx} height={sizePx} viewBox="0 0 24 24" aria-hidden>
      <Path
        d={path}
        fill="none"
        stroke={colour}
        strokeWidth={1.8}
        strokeLinecap="round"
        strokeLinejoin="round"
      />
    </Svg>
  );
}
