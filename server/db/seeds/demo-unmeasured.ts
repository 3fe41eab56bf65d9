/** People of the demonstration who are registered and wait for their first measurement. All invented. */
import { person } from './demo-case';
import type { DemoPerson } from './demo-eye';

export const NOT_MEASURED_YET: readonly [DemoPerson, ...DemoPerson[]] = [
  person('D-0401', 'Brinesby, Clara', ['1952-06-06', 'female']),
  person('D-0402', 'Shoalwick, Ernst', ['1948-11-23', 'male']),
];
