import { isAbsolute, join } from 'node:path';
import { statSync } from 'node:fs';
import { readConfig } from '@/server/config';
import { loadTokenSecret } from '@/server/secret';
import { temporaryFolder } from '@/tests/support/temporary-folder';

describe('settings', () => {
  it('have defaults for everything: a demonstration on port 3000 with its data in the project', () => {
    const config = readConfig({});

    expect(config).toMatchObject({
      port: 3000,
      isDemo: true,
      origin: 'http://localhost:3000',
      smtpUrl: undefined,
      proxyHops: 0,
      isProduction: false,
    });
    expect(isAbsolute(config.dataFolder)).toBe(true);
    expect(config.databasePath).toBe(join(config.dataFolder, 'landfall.sqlite'));
  });

  it('follow the environment', () => {
    const config = readConfig({
      PORT: '4000',
      LANDFALL_DEMO: '0',
      LANDFALL_DATA: '/srv/landfall',
      LANDFALL_ORIGIN: 'https://lenses.practice.example/',
      LANDFALL_SMTP_URL: 'smtps://mail.practice.example',
      NODE_ENV: 'production',
    });

    expect(config).toMatchObject({
      port: 4000,
      isDemo: false,
      dataFolder: '/srv/landfall',
      origin: 'https://lenses.practice.example',
      smtpUrl: 'smtps://mail.practice.example',
      isProduction: true,
    });
  });

  it.each([
    [{ PORT: '80a' }, /PORT/],
    [{ PORT: '70000' }, /PORT/],
    [{ LANDFALL_DEMO: 'yes' }, /LANDFALL_DEMO/],
    [{ LANDFALL_SMTP_URL: 'mail.practice.example' }, /LANDFALL_SMTP_URL/],
    [{ LANDFALL_ORIGIN: 'javascript:alert(1)' }, /LANDFALL_ORIGIN/],
  ])('refuse %j by name', (environment, message) => {
    expect(() => readConfig(environment)).toThrow(message);
  });
});

describe('the secret of the tokens', () => {
  it('is made once and readable by the owner only', () => {
    const folder = temporaryFolder();

    const first = loadTokenSecret(folder.path);
    const second = loadTokenSecret(folder.path);

    expect(first).toMatch(/^[\w-]{64}$/);
    expect(second).toBe(first);
    expect(statSync(join(folder.path, 'token-secret')).mode & 0o777).toBe(0o600);
    folder.remove();
  });
});
