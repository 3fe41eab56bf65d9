/** The catalogue, and the correction of the everyday lens's constants some weeks later. */
import { createLens, listLenses, updateLens } from '@/server/features/lenses/lens.service';
import { EVERYDAY_LENS } from './demo-case';
import { clinicMoment } from './demo-days';
import { demoLenses, everydayLensBefore } from './demo-lenses';
import type { SeedStep } from './seed-step';

const CATALOGUE_DAYS_AGO = 950;
const CORRECTION_DAYS_AGO = 90;

export function lensSteps(today: string): SeedStep[] {
  const lenses = demoLenses();
  const everyday = lenses.filter(({ name }) => name === EVERYDAY_LENS);
  return [
    {
      at: clinicMoment(today, CATALOGUE_DAYS_AGO, '08:30'),
      by: 'administrator',
      async perform(act) {
        const atFirst = lenses.map((lens) => (lens.name === EVERYDAY_LENS ? everydayLensBefore() : lens));
        for (const lens of atFirst) await createLens(act, lens, { isDemo: true });
      },
    },
    {
      at: clinicMoment(today, CORRECTION_DAYS_AGO, '09:10'),
      by: 'administrator',
      async perform(act) {
        const stored = await listLenses(act.transaction);
        for (const lens of everyday) {
          const before = stored.find(({ name }) => name === lens.name);
          if (before) await updateLens(act, before, lens);
        }
      },
    },
  ];
}
