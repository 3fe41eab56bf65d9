/** Every route of the API. A feature that is not named here does not exist. */
import type { Deps } from '@/server/deps';
import { practiceRoutes } from '@/server/features/practice/practice.routes';
import type { Route } from '@/server/http/route';

export function allRoutes(_deps: Deps): Route[] {
  return [...practiceRoutes()];
}
