import { randomUUID } from 'node:crypto';
import { inAct } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import { auditOf } from '@/tests/support/audit-trail';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let administrator: SignedIn;
let technician: SignedIn;
const patientId = randomUUID();

beforeAll(async () => {
  test = await startTestApp();
  administrator = await test.signInAs('administrator');
  technician = await test.signInAs('technician');
  for (const [noun, action] of [
    ['patient', 'patient.create'],
    ['patient', 'patient.view'],
    ['lens', 'lens.create'],
  ] as const)
    await inAct(test.deps, { actor: technician, requestId: randomUUID() }, (act) =>
      recordAudit(act, {
        action,
        noun,
        nounId: `${noun}-1`,
        ...(noun === 'patient' ? { patientId } : {}),
        version: 3,
        detail: { before: 'a', after: 'b' },
      }),
    );
});
afterAll(() => test.close());

const actionsOf = async (query: string): Promise<string[]> => {
  const reply = await administrator.get(`/api/audit?${query}`);
  return reply.body.items.map(({ action }: { action: string }) => action);
};

describe('the audit trail', () => {
  it('shows who did what, when, to which version, newest first', async () => {
    const reply = await administrator.get('/api/audit?limit=1');

    expect(reply.status).toBe(200);
    expect(reply.body.items).toEqual([
      {
        id: 3,
        at: test.clock.now().toISOString(),
        actorId: technician.id,
        actorName: technician.displayName,
        action: 'lens.create',
        noun: 'lens',
        nounId: 'lens-1',
        patientId: null,
        version: 3,
        requestId: expect.any(String),
        detail: { before: 'a', after: 'b' },
      },
    ]);
  });

  it('can be narrowed to a noun, a thing, a patient, a person', async () => {
    expect(await actionsOf('noun=lens')).toEqual(['lens.create']);
    expect(await actionsOf('nounId=patient-1')).toEqual(['patient.view', 'patient.create']);
    expect(await actionsOf(`patientId=${patientId}`)).toEqual(['patient.view', 'patient.create']);
    expect(await actionsOf(`actorId=${technician.id}&noun=patient`)).toEqual([
      'patient.view',
      'patient.create',
    ]);
    expect(await actionsOf(`actorId=${administrator.id}`)).toEqual([]);
  });

  it('goes on from where the last page ended', async () => {
    const first = await administrator.get('/api/audit?limit=2');
    const second = await administrator.get(`/api/audit?limit=2&after=${first.body.next}`);

    expect(first.body.items.map(({ id }: { id: number }) => id)).toEqual([3, 2]);
    expect(second.body.items.map(({ id }: { id: number }) => id)).toEqual([1]);
    expect(second.body.next).toBeUndefined();
  });

  it('is for the administrator only', async () => {
    expect((await technician.get('/api/audit')).status).toBe(403);
  });

  it('keeps nothing of an act that failed', async () => {
    const failing = inAct(test.deps, { actor: technician, requestId: null }, async (act) => {
      await recordAudit(act, { action: 'patient.lost', noun: 'patient' });
      throw new Error('stopped');
    });

    await expect(failing).rejects.toThrow('stopped');
    expect(await auditOf('patient.lost')).toEqual([]);
  });
});
