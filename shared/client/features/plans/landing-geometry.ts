/**
 * Geometry of the landing chart: where a refraction stands on the x axis, and the outline of the hill that
 * shows how likely each refraction is. Pure, so that the drawing can be tested without a screen.
 */
import { scaleLinear } from 'd3-scale';
import { area, curveBasis } from 'd3-shape';
import type { Candidate } from '@/shared/contract';

export interface RefractionScale {
  /** Refraction in D to pixels. More negative (nearsighted) lies to the left. */
  x: (refractionD: number) => number;
  minD: number;
  maxD: number;
  ticksD: number[];
}

/** Refractions further than this from the target are not worth a place on the axis. */
const WIDEST_REACH_D = 3;
/** Standard deviations of the outer hills that must fit. */
const HILL_REACH_SD = 2;
const HILL_POINTS = 49;

/** One x axis for all rows: wide enough for every candidate's hill, in half dioptres, never beyond ±3 D of the target. */
export function refractionScale(
  candidates: readonly Candidate[],
  targetD: number,
  widthPx: number,
): RefractionScale {
  const lows = candidates.map((c) => Math.min(c.lowestD, c.landing.meanD - HILL_REACH_SD * c.landing.sdD));
  const highs = candidates.map((c) => Math.max(c.highestD, c.landing.meanD + HILL_REACH_SD * c.landing.sdD));
  const minD = Math.max(Math.floor(Math.min(...lows, targetD - 1) * 2) / 2, targetD - WIDEST_REACH_D);
  const maxD = Math.min(Math.ceil(Math.max(...highs, targetD + 1) * 2) / 2, targetD + WIDEST_REACH_D);
  const scale = scaleLinear().domain([minD, maxD]).range([0, widthPx]);
  const spacing = widthPx / (maxD - minD) < 70 ? 1 : 0.5;
  const firstTick = Math.ceil(minD / spacing) * spacing;
  const ticksD = Array.from(
    { length: Math.floor((maxD - firstTick) / spacing) + 1 },
    (_, i) => firstTick + i * spacing,
  );
  return { x: (refractionD) => scale(refractionD), minD, maxD, ticksD };
}

/** True when the value lies on the axis; marks outside are left to the table rather than drawn at the edge. */
export function isOnAxis(scale: RefractionScale, refractionD: number): boolean {
  return refractionD >= scale.minD && refractionD <= scale.maxD;
}

/**
 * Outline of the density of where the refraction lands. Hills of one chart share the height of the narrowest
 * spread, so a less certain landing is visibly lower and wider. Cut at the ends of the axis.
 */
export function hillPath(
  landing: { meanD: number; sdD: number },
  scale: RefractionScale,
  box: { baselinePx: number; heightPx: number; narrowestSdD: number },
): string {
  const fromD = Math.max(landing.meanD - 3.2 * landing.sdD, scale.minD);
  const toD = Math.min(landing.meanD + 3.2 * landing.sdD, scale.maxD);
  if (toD <= fromD) return '';
  const points = Array.from(
    { length: HILL_POINTS },
    (_, i) => fromD + ((toD - fromD) * i) / (HILL_POINTS - 1),
  );
  const relativeDensity = (d: number) =>
    (box.narrowestSdD / landing.sdD) * Math.exp(-0.5 * ((d - landing.meanD) / landing.sdD) ** 2);
  const outline = area<number>()
    .x((d) => scale.x(d))
    .y0(box.baselinePx)
    .y1((d) => box.baselinePx - box.heightPx * relativeDensity(d))
    .curve(curveBasis);
  return outline(points) ?? '';
}
