import request from 'supertest';
import { paths, type LensDetail } from '@/shared/contract';
import { AuditEntryModel } from '@/server/db/models/audit-entry';
import { aLens } from '@/tests/support/lenses';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let administrator: SignedIn;
let surgeon: SignedIn;
const UNKNOWN = '3f0c5f2e-8f0e-4a53-9f5e-2b3f4f6f7a11';

beforeEach(async () => {
  test = await startTestApp();
  administrator = await test.signInAs('administrator');
  surgeon = await test.signInAs('surgeon');
});
afterEach(() => test.close());

const audits = (action: string) => AuditEntryModel.findAll({ where: { action } });
const add = async (change = {}): Promise<LensDetail> => {
  const reply = await administrator.post(paths.lenses(), aLens(change));
  expect(reply.status).toBe(201);
  return reply.body as LensDetail;
};

it('adds a model with its constants', async () => {
  const reply = await administrator.post(paths.lenses(), aLens());

  expect([reply.status, reply.headers.etag]).toEqual([201, '"0"']);
  expect(reply.headers.location).toBe(paths.lens(reply.body.id));
  expect(reply.body).toMatchObject({ ...aLens(), isDemo: false, version: 0 });
  expect(reply.body.constantHistory).toHaveLength(2);
  expect(reply.body.constantHistory[0]).toMatchObject({
    recordedBy: administrator.displayName,
    replacedAt: null,
  });
  expect(await audits('lens.create')).toMatchObject([{ actorId: administrator.id, nounId: reply.body.id }]);
  expect((await surgeon.get(paths.lens(reply.body.id))).body).toEqual(reply.body);
});

it('lists the whole catalogue by name', async () => {
  await add({ name: 'B' });
  await add({ name: 'A', isRetired: true });

  const { body } = await surgeon.get(paths.lenses());
  expect(body.items.map(({ name, isRetired }: LensDetail) => [name, isRetired])).toEqual([
    ['A', true],
    ['B', false],
  ]);
  expect(body.items[0].constants).toEqual(aLens().constants);
});

it('keeps replaced constants with the moment of their replacement', async () => {
  const { id } = await add();
  test.clock.advance(1000);
  const [srkt, haigis] = aLens().constants;
  const changed = { ...srkt, values: { aConstant: 119.1 }, dated: '2026-01-01' };
  const reply = await administrator.put(
    paths.lens(id),
    aLens({ constants: [changed as never, haigis as never] }),
    0,
  );

  expect([reply.status, reply.headers.etag]).toEqual([200, '"1"']);
  expect(reply.body.constants).toEqual([changed, haigis]);
  expect(
    reply.body.constantHistory.map((one: LensDetail['constantHistory'][number]) => [
      one.values,
      one.recordedAt,
      one.replacedAt,
    ]),
  ).toEqual([
    [{ aConstant: 119.1 }, '2026-03-02T09:00:01.000Z', null],
    expect.arrayContaining([expect.anything()]),
    expect.arrayContaining([expect.anything()]),
  ]);
  expect(reply.body.constantHistory).toContainEqual(
    expect.objectContaining({
      values: { aConstant: 118.9 },
      recordedAt: '2026-03-02T09:00:00.000Z',
      replacedAt: '2026-03-02T09:00:01.000Z',
    }),
  );
  expect(await audits('lens.change')).toMatchObject([
    {
      version: 1,
      detail: { before: { constants: aLens().constants }, after: { constants: [changed, haigis] } },
    },
  ]);
});

it('counts the version up for a change of constants alone, within the same moment', async () => {
  const { id } = await add();
  const reply = await administrator.put(paths.lens(id), aLens({ constants: [] }), 0);

  expect([reply.headers.etag, reply.body.constants]).toEqual(['"1"', []]);
});

it('changes nothing when nothing changed', async () => {
  const { id } = await add();
  const reversed = aLens({ constants: [...aLens().constants].reverse() });
  const reply = await administrator.put(paths.lens(id), reversed, 0);

  expect([reply.status, reply.headers.etag, reply.body.constantHistory.length]).toEqual([200, '"0"', 2]);
  expect(await audits('lens.change')).toEqual([]);
});

it('rejects a change of what was changed meanwhile, and asks for the version', async () => {
  const { id } = await add();
  await administrator.put(paths.lens(id), aLens({ remarks: 'first' }), 0);
  const late = await administrator.put(paths.lens(id), aLens({ remarks: 'late' }), 0);

  expect(late.status).toBe(412);
  expect(late.body.current).toMatchObject({ id, remarks: 'first', version: 1 });
  expect((await administrator.put(paths.lens(id), aLens())).status).toBe(428);
});

it('refuses a name that is taken, whatever its capitals', async () => {
  await add();
  const { id } = await add({ name: 'Two' });
  const added = await administrator.post(paths.lenses(), aLens({ name: 'INVENTED one' }));

  expect([added.status, added.body.errors[0].path]).toEqual([409, 'name']);
  expect((await administrator.put(paths.lens(id), aLens(), 0)).status).toBe(409);
  expect((await administrator.put(paths.lens(id), aLens({ name: 'TWO' }), 0)).status).toBe(200);
});

it('names the field that is wrong', async () => {
  const wrong = aLens({ isToric: true, powerRanges: [{ fromD: 10, toD: 30, stepD: 0.3 }] });
  const reply = await administrator.post(paths.lenses(), wrong);

  expect(reply.status).toBe(422);
  expect(reply.body.errors.map(({ path }: { path: string }) => path)).toContain('powerRanges.0.stepD');
  const otherFormula = { ...aLens().constants[0], formula: 'haigis' };
  const second = await administrator.post(paths.lenses(), { ...aLens(), constants: [otherFormula] });
  expect(second.body.errors[0].path).toBe('constants.0.values');
});

it('is read and written by those who may', async () => {
  const { id } = await add();
  const technician = await test.signInAs('technician');

  expect((await request(test.app).get(paths.lenses())).status).toBe(401);
  expect((await technician.get(paths.lenses())).status).toBe(403);
  expect((await surgeon.post(paths.lenses(), aLens())).status).toBe(403);
  expect((await surgeon.put(paths.lens(id), aLens(), 0)).status).toBe(403);
  expect((await surgeon.get(paths.lens(UNKNOWN))).status).toBe(404);
  expect((await administrator.put(paths.lens(UNKNOWN), aLens(), 0)).status).toBe(404);
});
