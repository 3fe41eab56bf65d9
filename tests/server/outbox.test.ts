import { createOutboxMailer } from '@/server/features/outbox/outbox.service';
import type { Mailer } from '@/server/mail/mailer';
import { SECOND } from '@/tests/support/fake-clock';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
let administrator: SignedIn;
let mailer: Mailer;

beforeAll(async () => {
  test = await startTestApp();
  administrator = await test.signInAs('administrator');
  mailer = await createOutboxMailer(test.deps);
});
afterAll(async () => {
  await mailer.close();
  await test.close();
});

const LONG_LINE = `https://practice.example/set-password?token=${'aB3-_'.repeat(60)}`;
const TEXT = `Dear Zoë Tide,\n\n.a line that begins with a dot\n${LONG_LINE}\n\nÅse & Øyvind: 21.50 D — “fine”`;

describe('the outbox', () => {
  it('keeps what travelled by SMTP exactly as it was written', async () => {
    await mailer.send({ to: 'zoe@practice.example', subject: 'Your account in Landfall', text: TEXT });

    const reply = await administrator.get('/api/outbox');

    expect(reply.status).toBe(200);
    expect(reply.body.items).toEqual([
      {
        id: expect.any(String),
        to: 'zoe@practice.example',
        subject: 'Your account in Landfall',
        text: TEXT,
        sentAt: test.clock.now().toISOString(),
      },
    ]);
  });

  it('shows the newest mail first, in pages', async () => {
    test.clock.advance(SECOND);
    await mailer.send({ to: 'second@practice.example', subject: 'Second', text: 'b' });

    const first = await administrator.get('/api/outbox?limit=1');
    const second = await administrator.get(`/api/outbox?limit=1&after=${first.body.next}`);

    expect(first.body.items[0].to).toBe('second@practice.example');
    expect(second.body.items[0].to).toBe('zoe@practice.example');
    expect(second.body.next).toBeUndefined();
  });

  it('is for the administrator only: its links open accounts', async () => {
    const surgeon = await test.signInAs('surgeon');

    expect((await surgeon.get('/api/outbox')).status).toBe(403);
  });

  it('does not fall over header lines in an address', async () => {
    const send = mailer.send({
      to: 'a@practice.example\r\nBcc: b@elsewhere.example',
      subject: 'x',
      text: 'y',
    });
    await send.catch(() => undefined);

    const reply = await administrator.get('/api/outbox');
    const recipients = reply.body.items.map(({ to }: { to: string }) => to).join();
    expect(recipients).not.toContain('elsewhere');
  });
});
