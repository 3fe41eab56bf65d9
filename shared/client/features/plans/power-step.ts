import type { Lens } from '@/shared/contract';

/** The step of the range in which a power lies: decides how many decimals are shown. */
export function powerStepD(lens: Pick<Lens, 'powerRanges'> | undefined, powerD: number): number {
  const ranges = lens?.powerRanges ?? [];
  const range = ranges.find((candidate) => powerD >= candidate.fromD && powerD <= candidate.toD);
  return range?.stepD ?? 0.5;
}
