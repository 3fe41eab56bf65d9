/** Limits guesses of passwords and codes. Counted before the check, so that parallel guesses count too. */
import type { Clock } from '@/server/clock';
import { ProblemError } from '@/server/http/problem';

export const ATTEMPTS_PER_WINDOW = 5;
const WINDOW_MS = 15 * 60 * 1000;
const SWEEP_ABOVE_KEYS = 10_000;

interface Attempts {
  count: number;
  endsAtMs: number;
}

export interface Throttle {
  /** Counts one attempt and says how many are left; throws 429 when none was. */
  attempt(key: string): number;
  /** The attempt succeeded: forget the failures before it. */
  reset(key: string): void;
}

export function createThrottle(clock: Clock): Throttle {
  const attempts = new Map<string, Attempts>();
  return {
    attempt(key) {
      const nowMs = clock.now().getTime();
      if (attempts.size > SWEEP_ABOVE_KEYS) removeEnded(attempts, nowMs);
      const known = attempts.get(key);
      const entry = known && known.endsAtMs > nowMs ? known : { count: 0, endsAtMs: nowMs + WINDOW_MS };
      if (entry.count >= ATTEMPTS_PER_WINDOW) {
        const retryAfterS = Math.ceil((entry.endsAtMs - nowMs) / 1000);
        throw new ProblemError('too-many-requests', undefined, { retryAfterS });
      }
      attempts.set(key, { ...entry, count: entry.count + 1 });
      return ATTEMPTS_PER_WINDOW - entry.count - 1;
    },
    reset(key) {
      attempts.delete(key);
    },
  };
}

function removeEnded(attempts: Map<string, Attempts>, nowMs: number): void {
  for (const [key, { endsAtMs }] of attempts) if (endsAtMs <= nowMs) attempts.delete(key);
}
