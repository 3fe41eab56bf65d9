/** The choice as a counsellor would say it. */
import { LENS_KIND_NAMES, type Lens, type PlanChoice, type Side } from '@/shared/contract';
import { powerWords, signedD } from '@/shared/clinical/number-words';

export interface ChoiceInWords {
  side: Side;
  choice: PlanChoice | null;
  lens: Pick<Lens, 'name' | 'kind' | 'isToric'> | undefined;
  targetD: number;
}

/** `Right eye: monofocal lens Pilot Mono, power +21.5 D, aiming at −0.25 D (…)` */
export function plainWords({ side, choice, lens, targetD }: ChoiceInWords): string {
  const eye = side === 'right' ? 'Right eye' : 'Left eye';
  if (!choice || !lens) return `${eye}: no lens chosen yet`;
  const kind = `${LENS_KIND_NAMES[lens.kind].toLowerCase()}${lens.isToric ? ' toric' : ''} lens ${lens.name}`;
  return `${eye}: ${kind}, power ${powerWords(choice.powerD)} D, aiming at ${signedD(targetD)} D (${aimWords(targetD)})`;
}

/** What the target means for seeing without glasses with a lens of one focus; averages, never a promise. */
function aimWords(targetD: number): string {
  const band = AIMS.find(({ fromD }) => targetD >= fromD);
  return band?.words ?? FOR_NEAR;
}

const FOR_NEAR = 'nearsighted on purpose: made for reading, with glasses for distance';
const AIMS: readonly { fromD: number; words: string }[] = [
  { fromD: 0.26, words: 'farsighted: glasses for every distance' },
  { fromD: 0, words: 'made for clear distance, with glasses for reading' },
  {
    fromD: -0.3,
    words:
      'slightly nearsighted so that a small miss does not end farsighted; distance clear, with glasses for reading',
  },
  { fromD: -0.75, words: 'a little nearsighted: distance almost clear, with glasses for reading' },
  {
    fromD: -1.5,
    words: 'nearsighted on purpose: made for arm’s length, with glasses for far and for small print',
  },
];
