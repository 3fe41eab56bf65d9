import type { Clock } from '@/server/clock';

export interface FakeClock extends Clock {
  advance(milliseconds: number): void;
}

export const SECOND = 1000;
export const MINUTE = 60 * SECOND;
export const HOUR = 60 * MINUTE;

export function fakeClock(start = '2026-03-02T09:00:00.000Z'): FakeClock {
  let nowMs = Date.parse(start);
  return {
    now: () => new Date(nowMs),
    advance: (milliseconds) => void (nowMs += milliseconds),
  };
}
