/**
 * `npm run bench [name …]`: measured figures, never part of the tests and never a failure on time. Machines
 * differ and drift, so what matters is given as a ratio of two things measured in the same run.
 */
import type { BenchRow } from './bench-row';
import { benchFirstLoad } from './first-load.bench';
import { benchFormulas } from './formulas.bench';
import { benchImport } from './import.bench';
import { benchPersonalisation } from './personalisation.bench';
import { benchPlan } from './plan.bench';

const BENCHES: Record<string, () => BenchRow[] | Promise<BenchRow[]>> = {
  formulas: benchFormulas,
  personalisation: benchPersonalisation,
  plan: benchPlan,
  import: benchImport,
  'first-load': benchFirstLoad,
};

async function main(): Promise<void> {
  const wanted = process.argv.slice(2);
  for (const [name, bench] of Object.entries(BENCHES)) {
    if (wanted.length > 0 && !wanted.includes(name)) continue;
    for (const row of await bench()) {
      const value = row.value.toPrecision(3);
      console.log(
        `${row.name.padEnd(64)} ${value.padStart(9)} ${row.unit}${row.aim ? `   (aim ${row.aim})` : ''}`,
      );
    }
  }
}

void main();
