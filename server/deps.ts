/** Everything that the application is given from outside. Tests replace clock, random and mailer only. */
import type { Logger } from 'pino';
import type { Background } from '@/server/background';
import type { Clock, Random } from '@/server/clock';
import type { Config } from '@/server/config';
import type { Database } from '@/server/db/connection';
import type { Throttle } from '@/server/http/throttle';
import type { Mailer } from '@/server/mail/mailer';

export interface Deps {
  config: Config;
  clock: Clock;
  random: Random;
  db: Database;
  mailer: Mailer;
  logger: Logger;
  background: Background;
  /** Counts failed passwords and codes. */
  throttle: Throttle;
  /** Signs the access tokens. */
  tokenSecret: string;
}
