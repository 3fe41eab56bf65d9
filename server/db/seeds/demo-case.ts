/** How a case of the demonstration is written down: who, which eyes, and what was done so far. */
import type { EyeHistory, Side } from '@/shared/contract';
import type { DemoEye, DemoPerson } from './demo-eye';

export interface DemoCase {
  /** What this case is there for. */
  story: string;
  person: DemoPerson;
  /** As measured first; null: not measured. */
  right: DemoEye | null;
  left: DemoEye | null;
  /** Measured again, in the order in which it happened. */
  again?: readonly DemoRemeasurement[];
  /** What differs from an eye that never had anything. */
  history?: Partial<Record<Side, Partial<EyeHistory>>>;
  /** Stops that somebody settled before the plan. */
  settled?: readonly DemoSettlement[];
  plan?: Partial<Record<Side, DemoPlan>>;
}

export interface DemoRemeasurement {
  side: Side;
  eye: DemoEye;
  /** Typed in by hand in the place of the measurement before, for this reason; else it stands beside it. */
  because?: string;
}

export interface DemoSettlement {
  side: Side;
  ruleId: string;
  because: string;
  daysAgo: number;
}

export interface DemoPlan {
  /** Open: inputs only. Chosen: with lens and power, ready to be signed. */
  state: 'open' | 'chosen' | 'signed';
  daysAgo: number;
  /** The model chosen, or the one at hand while nothing is chosen. */
  lensName: string;
  targetD: number;
}

export const EVERYDAY_LENS = 'Pilot Mono';
/** Compared in every plan: what goes in when the bag does not hold. */
export const BACKUP_LENS = 'Anchor Three';

export const signed = (daysAgo: number, lensName = EVERYDAY_LENS, targetD = -0.25): DemoPlan => ({
  state: 'signed',
  daysAgo,
  lensName,
  targetD,
});
export const draft = (daysAgo: number, lensName = EVERYDAY_LENS, targetD = -0.25): DemoPlan => ({
  ...signed(daysAgo, lensName, targetD),
  state: 'open',
});
export const chosen = (daysAgo: number, lensName = EVERYDAY_LENS, targetD = -0.25): DemoPlan => ({
  ...signed(daysAgo, lensName, targetD),
  state: 'chosen',
});

export const person = (
  record: string,
  name: string,
  [born, sex]: readonly [string, DemoPerson['sex']],
): DemoPerson => {
  const [family = '', given = ''] = name.split(', ');
  return { record, family, given, born, sex };
};
