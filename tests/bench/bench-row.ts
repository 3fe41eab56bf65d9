/** One measured figure. `aim` is what we want it to be; a bench never fails on it. */
export interface BenchRow {
  name: string;
  value: number;
  unit: string;
  aim?: string;
}
