/** Uploading and confirming, as a technician does it. */
import type { Response } from 'supertest';
import request from 'supertest';
import { paths, type BiometryImport, type ImportRow } from '@/shared/contract';
import type { SignedIn, TestApp } from '@/tests/support/test-app';

export async function postFile(
  test: TestApp,
  person: SignedIn,
  bytes: Buffer | string,
  fileName = 'biometry.csv',
): Promise<Response> {
  return request(test.app)
    .post(paths.imports())
    .set('Authorization', `Bearer ${person.accessToken}`)
    .attach('file', Buffer.from(bytes), fileName);
}

/** Uploads and waits for the check. */
export async function upload(
  test: TestApp,
  person: SignedIn,
  bytes: Buffer | string,
  fileName?: string,
): Promise<BiometryImport> {
  const posted = await postFile(test, person, bytes, fileName);
  expect(posted.status).toBe(201);
  return settled(test, person, (posted.body as BiometryImport).id);
}

/** Confirms and waits until it is stored. */
export async function confirm(test: TestApp, person: SignedIn, id: string): Promise<BiometryImport> {
  const confirmed = await person.post(paths.importConfirm(id));
  expect(confirmed.status).toBe(200);
  return settled(test, person, id);
}

export async function rowsOf(person: SignedIn, id: string): Promise<ImportRow[]> {
  const listed = await person.get(`${paths.importRows(id)}?limit=200`);
  expect(listed.status).toBe(200);
  return (listed.body as { items: ImportRow[] }).items;
}

async function settled(test: TestApp, person: SignedIn, id: string): Promise<BiometryImport> {
  await test.deps.background.idle();
  return (await person.get(paths.import(id))).body as BiometryImport;
}
