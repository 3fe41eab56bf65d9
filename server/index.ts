/** The process: settings, start, what the console says, signals. */
import { readConfig } from '@/server/config';
import { createLogger } from '@/server/http/logging';
import { makeFirstAdministratorCode } from '@/server/features/practice/first-administrator.service';
import { describePractice } from '@/server/features/practice/practice.service';
import { startServer, type RunningServer } from '@/server/start';

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const logger = createLogger({ isProduction: config.isProduction });
  const server = await startServer(config, logger);
  await announce(server);

  let isStopping = false;
  const stop = (): void => {
    if (isStopping) return;
    isStopping = true;
    server.stop().then(
      () => process.exit(0),
      (error: unknown) => {
        logger.error({ err: error }, 'stopping failed');
        process.exit(1);
      },
    );
  };
  process.on('SIGTERM', stop);
  process.on('SIGINT', stop);
}

async function announce({ deps, port }: RunningServer): Promise<void> {
  const { demoAccounts } = await describePractice();
  const code = await makeFirstAdministratorCode(deps);
  const lines = [`Landfall is at ${deps.config.origin} (port ${port})`];
  if (demoAccounts.length > 0) lines.push('', 'Demo accounts (invented people, e-mail and password):');
  for (const { email, password } of demoAccounts) lines.push(`  ${email.padEnd(34)}${password}`);
  if (code)
    lines.push(
      '',
      'There is no account yet. Open the address and make the administrator with this code:',
      `  ${code}`,
    );
  console.log(`\n${lines.join('\n')}\n`);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
