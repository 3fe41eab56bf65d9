/** Binds every model to a connection. */
import type { Sequelize } from 'sequelize';
import { initAccount } from './account';
import { initAuditEntry } from './audit-entry';
import { initEye } from './eye';
import { initFlagSettlement } from './flag-settlement';
import { initIdempotencyKey } from './idempotency-key';
import { initImport } from './import';
import { initLens } from './lens';
import { initLensConstant } from './lens-constant';
import { initMail } from './mail';
import { initMeasurement } from './measurement';
import { initPasswordLink } from './password-link';
import { initPatient } from './patient';
import { initPlan } from './plan';
import { initRefreshSession } from './refresh-session';
import { initSetting } from './setting';

const INITIALISERS = [
  initAccount,
  initAuditEntry,
  initEye,
  initFlagSettlement,
  initIdempotencyKey,
  initImport,
  initLens,
  initLensConstant,
  initMail,
  initMeasurement,
  initPasswordLink,
  initPatient,
  initPlan,
  initRefreshSession,
  initSetting,
];

export function initModels(sequelize: Sequelize): void {
  for (const init of INITIALISERS) init(sequelize);
}
