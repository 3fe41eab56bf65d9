/** The process is killed while it stores a file: afterwards nothing of the file is there, and it can be stored. */
import { rmSync } from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import request from 'supertest';
import { paths, type BiometryImport } from '@/shared/contract';
import { csvOf, manyRows } from '@/tests/support/biometry-csv';
import { kill, prepareDataFolder, startProcess, type ServerProcess } from '@/tests/support/server-process';
import { TEST_PASSWORD } from '@/tests/support/test-app';

const EMAIL = 'technician@practice.example';
const ROWS = 50_000;

let folder: string;
let server: ServerProcess | undefined;

beforeAll(async () => {
  folder = await prepareDataFolder(EMAIL, ['technician']);
}, 60_000);
afterAll(async () => {
  if (server) await kill(server);
  rmSync(folder, { recursive: true, force: true });
});

interface Client {
  get<T>(path: string): Promise<T>;
  post<T>(path: string): Promise<T>;
  upload(bytes: string): Promise<BiometryImport>;
}

async function signIn({ origin }: ServerProcess): Promise<Client> {
  const signedIn = await request(origin).post(paths.signIn()).send({ email: EMAIL, password: TEST_PASSWORD });
  const token = `Bearer ${signedIn.body.accessToken}`;
  return {
    get: async (path) => (await request(origin).get(path).set('Authorization', token)).body,
    post: async (path) => (await request(origin).post(path).set('Authorization', token).send({})).body,
    upload: async (bytes) =>
      (
        await request(origin)
          .post(paths.imports())
          .set('Authorization', token)
          .attach('file', Buffer.from(bytes), 'many.csv')
      ).body,
  };
}

/** Asks again and again, as the client does, until the import is as wanted. */
async function until(
  client: Client,
  id: string,
  isWanted: (state: BiometryImport) => boolean,
): Promise<BiometryImport> {
  for (let attempt = 0; attempt < 3000; attempt += 1) {
    const state = await client.get<BiometryImport>(paths.import(id));
    if (isWanted(state)) return state;
    await wait(20);
  }
  throw new Error('The import did not get there');
}

it('stores nothing of the file, and stores all of it the next time', async () => {
  server = await startProcess(folder);
  let client = await signIn(server);
  const { id } = await client.upload(csvOf(manyRows(ROWS)));
  await until(client, id, ({ status }) => status === 'ready');

  await client.post(paths.importConfirm(id));
  const half = await until(client, id, ({ progress, status }) => status !== 'storing' || progress.done > 0);
  await kill(server);

  expect(half.status).toBe('storing');
  expect(half.progress.done).toBeLessThan(ROWS);
  expect(half.progress.total).toBe(ROWS);

  server = await startProcess(folder);
  client = await signIn(server);
  const after = await client.get<BiometryImport>(paths.import(id));
  const patients = await client.get<{ items: unknown[]; total: number }>(paths.patients());
  const rows = await client.get<{ items: { outcome: string }[] }>(`${paths.importRows(id)}?limit=3`);

  expect(after).toMatchObject({ status: 'ready', storedBy: null, storedAt: null });
  expect(patients).toMatchObject({ items: [], total: 0 });
  expect(rows.items.map(({ outcome }) => outcome)).toEqual(['created', 'created', 'created']);

  await client.post(paths.importConfirm(id));
  const stored = await until(client, id, ({ status }) => status !== 'storing');
  expect(stored).toMatchObject({
    status: 'stored',
    counts: { created: ROWS, alreadyThere: 0, refused: 0, newPatients: ROWS / 2 },
  });
  expect((await client.get<{ total: number }>(paths.patients())).total).toBe(ROWS / 2);
}, 180_000);
