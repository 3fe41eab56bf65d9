/** States and outcomes of an import in words. */
import type { BiometryImport, RowOutcome } from '@/shared/contract';
import type { MarkTone } from '@/shared/client/components/mark';

export const STATUS_WORDS: Record<BiometryImport['status'], string> = {
  checking: 'being checked',
  ready: 'waits for your confirmation',
  storing: 'being stored',
  stored: 'stored',
  refused: 'refused as a whole',
  discarded: 'discarded',
};

/** `will` before storing, `was` after. */
export const OUTCOME_WORDS: Record<RowOutcome, { tone: MarkTone; will: string; was: string }> = {
  created: { tone: 'fair', will: 'will be created', was: 'created' },
  'already-there': { tone: 'note', will: 'already there', was: 'were already there' },
  refused: { tone: 'stop', will: 'refused', was: 'refused' },
};
