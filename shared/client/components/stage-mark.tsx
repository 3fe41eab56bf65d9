/** Where an eye stands on its way: a mark and words. */
import type { EyeStage } from '@/shared/contract';
import { Mark } from './mark';
import type { MarkTone } from './mark';

const TONES: Record<EyeStage, MarkTone> = {
  measure: 'note',
  check: 'stop',
  plan: 'note',
  sign: 'weigh',
  signed: 'fair',
  'out-of-date': 'stop',
};

export function StageMark({ stage, words }: { stage: EyeStage; words: string }) {
  return <Mark tone={TONES[stage]} label={words} />;
}
