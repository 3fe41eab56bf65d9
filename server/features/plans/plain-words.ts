/** The choice as a counsellor would say it. */
import { LENS_KIND_NAMES, type Lens, type PlanChoice } from '@/shared/contract';

const MINUS = '\u2212';
const signed = (valueD: number, decimals: number): string => {
  const text = Math.abs(valueD).toFixed(decimals);
  if (Number(text) === 0) return text;
  return (valueD < 0 ? MINUS : '+') + text;
};

const powerText = (powerD: number): string => signed(powerD, Number.isInteger(powerD * 2) ? 1 : 2);

/** What the target means for distance without glasses, in words. */
function aimWords(targetD: number): string {
  if (targetD <= -1.5) return 'aimed at near: reading without glasses, glasses for distance';
  if (targetD <= -0.75) return 'aimed at arm’s length: glasses for far and for small print';
  if (targetD < -0.3) return 'aimed a little near: distance almost clear';
  if (targetD <= 0.25) return 'aimed at clear distance; glasses for reading unless the lens gives near';
  return 'aimed beyond distance';
}

/** `Monofocal lens Pilot Mono, power +21.5 D; aimed at clear distance … (target −0.25 D)` */
export function plainWords({
  choice,
  lens,
  targetD,
}: {
  choice: PlanChoice | null;
  lens: Pick<Lens, 'name' | 'kind' | 'isToric'> | undefined;
  targetD: number;
}): string {
  if (!choice || !lens) return 'No lens chosen yet';
  const kind = `${LENS_KIND_NAMES[lens.kind]}${lens.isToric ? ' toric' : ''} lens ${lens.name}`;
  return `${kind}, power ${powerText(choice.powerD)} D; ${aimWords(targetD)} (target ${signed(targetD, 2)} D)`;
}
