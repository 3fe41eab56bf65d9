/** All migrations, in the order in which they run. An explicit list: a glob would find other files in a build. */
import type { Migration } from './migration';
import { migration001 } from './001-tables';

export const MIGRATIONS: readonly Migration[] = [migration001];
