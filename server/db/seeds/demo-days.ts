/**
 * The calendar of the demonstration, counted back from the day on which it began, so that it does not age. The
 * practice is closed at weekends.
 */
import { localDateOf } from '@/shared/contract';

/** The last day on which the practice was open, `daysAgo` before the ISO date `today` or shortly before. */
export function clinicDay(today: string, daysAgo: number): string {
  const day = dayBefore(today, daysAgo);
  const weekday = day.getDay();
  const sinceFriday = weekday === 6 ? 1 : weekday === 0 ? 2 : 0;
  day.setDate(day.getDate() - sinceFriday);
  return localDateOf(day);
}

/** That day at a time of the clock on the wall, `HH:MM`, as an ISO moment. */
export function clinicMoment(today: string, daysAgo: number, time: string): string {
  return new Date(`${clinicDay(today, daysAgo)}T${time}:00`).toISOString();
}

function dayBefore(today: string, daysAgo: number): Date {
  // Noon is there on every day, even where clocks change at midnight.
  const day = new Date(`${today}T12:00:00`);
  day.setDate(day.getDate() - daysAgo);
  return day;
}
