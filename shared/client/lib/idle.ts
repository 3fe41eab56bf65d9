/**
 * How long nobody has done anything, over all tabs of this browser: a tab left in the background must not end
 * the session of somebody who works in another.
 */
import { readStored, writeStored } from './stored';

const KEY = 'landfall.last-act';
/** Each act is noted at most this often: the storage is shared and slow. */
const NOTE_EVERY_MS = 2_000;
export const WARNING_MS = 60_000;

export type IdleState = 'active' | 'warning' | 'over';

export interface IdleClock {
  /** Notes an act of this tab. */
  act: () => void;
  /** Where this browser stands now. */
  state: () => IdleState;
}

/** `limitMs` without an act is over; the last minute before it warns. */
export function createIdleClock(limitMs: number, now: () => number = Date.now): IdleClock {
  let ownActMs = now();
  let notedMs = Number.NEGATIVE_INFINITY;
  const act = () => {
    ownActMs = now();
    if (ownActMs - notedMs < NOTE_EVERY_MS) return;
    notedMs = ownActMs;
    writeStored(KEY, String(ownActMs));
  };
  const state = (): IdleState => {
    const quietMs = now() - Math.max(ownActMs, actOfOtherTabs(now()));
    if (quietMs >= limitMs) return 'over';
    return quietMs >= limitMs - WARNING_MS ? 'warning' : 'active';
  };
  act();
  return { act, state };
}

function actOfOtherTabs(nowMs: number): number {
  const storedMs = Number(readStored(KEY));
  // A clock set back, or nonsense in the storage, must not keep a session open for ever.
  return Number.isFinite(storedMs) && storedMs <= nowMs ? storedMs : 0;
}
