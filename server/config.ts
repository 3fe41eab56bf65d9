/** The settings of the process, from its environment. Nothing else reads `process.env`. */
import { join, resolve } from 'node:path';
import { z } from 'zod';

const onOff = z.enum(['0', '1']).transform((text) => text === '1');
const wholeNumber = (max: number) =>
  z
    .string()
    .regex(/^\d{1,5}$/, 'A whole number')
    .transform(Number)
    .pipe(z.number().max(max));

const environmentSchema = z.object({
  PORT: wholeNumber(65_535).default(3000),
  LANDFALL_DATA: z.string().min(1).default('data'),
  LANDFALL_DEMO: onOff.default(true),
  LANDFALL_SMTP_URL: z.url({ protocol: /^smtps?$/ }).optional(),
  /** Public address, when it is not http://localhost:PORT. Links in mails are built on it. */
  LANDFALL_ORIGIN: z.url({ protocol: /^https?$/ }).optional(),
  /** How many reverse proxies stand in front; their X-Forwarded headers are believed, no others. */
  LANDFALL_PROXY_HOPS: wholeNumber(5).default(0),
  LANDFALL_PRACTICE_NAME: z.string().trim().min(1).max(100).default('Cataract practice'),
  NODE_ENV: z.string().default('development'),
});

export interface Config {
  port: number;
  dataFolder: string;
  databasePath: string;
  /** Folder of the exported web client. */
  webFolder: string;
  isDemo: boolean;
  practiceName: string;
  smtpUrl: string | undefined;
  origin: string;
  proxyHops: number;
  /** Outside production each reply is checked against its schema, and errors are logged with their message. */
  isProduction: boolean;
  /** Requests to the public part of the API that one address may make in a minute. */
  publicRequestsPerMinute: number;
}

const PROJECT_FOLDER = resolve(__dirname, '..');

export function readConfig(environment: Record<string, string | undefined>): Config {
  const parsed = environmentSchema.safeParse(environment);
  if (!parsed.success) throw new Error(`Settings are wrong:\n${z.prettifyError(parsed.error)}`);
  const values = parsed.data;
  const dataFolder = resolve(PROJECT_FOLDER, values.LANDFALL_DATA);
  return {
    port: values.PORT,
    dataFolder,
    databasePath: join(dataFolder, 'landfall.sqlite'),
    webFolder: join(PROJECT_FOLDER, 'dist'),
    isDemo: values.LANDFALL_DEMO,
    practiceName: values.LANDFALL_PRACTICE_NAME,
    smtpUrl: values.LANDFALL_SMTP_URL,
    origin: values.LANDFALL_ORIGIN?.replace(/\/$/, '') ?? `http://localhost:${values.PORT}`,
    proxyHops: values.LANDFALL_PROXY_HOPS,
    isProduction: values.NODE_ENV === 'production',
    publicRequestsPerMinute: 300,
  };
}
