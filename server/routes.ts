/** Every route of the API. A feature that is not named here does not exist. */
import { auditRoutes } from '@/server/audit/audit.routes';
import type { Deps } from '@/server/deps';
import { accountRoutes } from '@/server/features/accounts/account.routes';
import { authRoutes } from '@/server/features/auth/auth.routes';
import { eyeRoutes } from '@/server/features/eyes/eye.routes';
import { homeRoutes } from '@/server/features/home/home.routes';
import { importRoutes } from '@/server/features/imports/import.routes';
import { lensRoutes } from '@/server/features/lenses/lens.routes';
import { measurementRoutes } from '@/server/features/measurements/measurement.routes';
import { outboxRoutes } from '@/server/features/outbox/outbox.routes';
import { patientRoutes } from '@/server/features/patients/patient.routes';
import { planRoutes } from '@/server/features/plans/plan.routes';
import { practiceRoutes } from '@/server/features/practice/practice.routes';
import type { Route } from '@/server/http/route';

export function allRoutes(deps: Deps): Route[] {
  return [
    ...practiceRoutes(deps),
    ...authRoutes(deps),
    ...homeRoutes(deps),
    ...accountRoutes(deps),
    ...patientRoutes(deps),
    ...eyeRoutes(),
    ...measurementRoutes(),
    ...importRoutes(deps),
    ...lensRoutes(),
    ...planRoutes(deps),
    ...outboxRoutes(),
    ...auditRoutes(),
  ];
}
