import { z } from 'zod';
import { upload } from '@/shared/client/api/upload';
import { sessionStarted } from '@/shared/client/api/session-store';
import { startFakeServer } from '@/tests/support/fake-server';
import { aSession } from '@/tests/support/sessions';

interface Reply {
  status: number;
  text: string;
}

/** The browser's request object, answering from a list. */
class FakeRequest {
  static replies: (Reply | 'offline')[] = [];
  static sent: FakeRequest[] = [];
  headers: Record<string, string> = {};
  form: FormData | undefined;
  isAborted = false;
  status = 0;
  responseText = '';
  upload: { onprogress?: (event: { loaded: number; total: number }) => void } = {};
  onload?: () => void;
  onerror?: () => void;
  onabort?: () => void;
  open() {}
  setRequestHeader(name: string, value: string) {
    this.headers[name] = value;
  }
  getResponseHeader() {
    return null;
  }
  abort() {
    this.isAborted = true;
    this.onabort?.();
  }
  send(form: FormData) {
    this.form = form;
    FakeRequest.sent.push(this);
    const reply = FakeRequest.replies.shift();
    if (reply === undefined) return;
    this.upload.onprogress?.({ loaded: 5, total: 20 });
    if (reply === 'offline') return this.onerror?.();
    this.status = reply.status;
    this.responseText = reply.text;
    this.onload?.();
  }
}

const file = new File(['record_number;side\n'], 'biometry.csv', { type: 'text/csv' });
const imported = z.object({ id: z.string() });
const STORED: Reply = { status: 201, text: '{"id":"import-1"}' };
const EXPIRED: Reply = {
  status: 401,
  text: '{"type":"urn:landfall:problem:unauthenticated","title":"Sign in first","status":401}',
};

beforeEach(() => {
  FakeRequest.sent = [];
  Object.assign(globalThis, { XMLHttpRequest: FakeRequest });
  sessionStarted(aSession());
});

it('sends the file with the bearer and the key, and tells how far it is', async () => {
  FakeRequest.replies = [STORED];
  const shares: number[] = [];

  const reply = await upload('/api/imports', imported, {
    file,
    idempotencyKey: 'key-12345',
    onProgress: (share) => shares.push(share),
  });

  expect(reply).toEqual({ id: 'import-1' });
  expect(shares).toEqual([0.25]);
  expect(FakeRequest.sent[0]?.headers).toMatchObject({
    Authorization: 'Bearer first-token',
    'Idempotency-Key': 'key-12345',
    'X-Landfall': '1',
  });
  expect(FakeRequest.sent[0]?.headers).not.toHaveProperty('Content-Type');
  expect((FakeRequest.sent[0]?.form?.get('file') as File).name).toBe('biometry.csv');
});

it('renews an expired token and sends again', async () => {
  FakeRequest.replies = [EXPIRED, STORED];
  startFakeServer().on('POST /api/auth/refresh', { json: aSession({ accessToken: 'second-token' }) });

  await expect(upload('/api/imports', imported, { file })).resolves.toEqual({ id: 'import-1' });

  expect(FakeRequest.sent[1]?.headers.Authorization).toBe('Bearer second-token');
});

it('throws what the server objects to', async () => {
  FakeRequest.replies = [
    {
      status: 413,
      text: '{"type":"urn:landfall:problem:too-large","title":"The upload is too large","status":413}',
    },
  ];

  await expect(upload('/api/imports', imported, { file })).rejects.toMatchObject({ code: 'too-large' });
});

it('tells when there is no answer', async () => {
  FakeRequest.replies = ['offline'];

  await expect(upload('/api/imports', imported, { file })).rejects.toMatchObject({ code: 'offline' });
});

it('can be given up', async () => {
  FakeRequest.replies = [];
  const giveUp = new AbortController();

  const uploading = upload('/api/imports', imported, { file, signal: giveUp.signal });
  giveUp.abort();

  await expect(uploading).rejects.toMatchObject({ name: 'AbortError' });
  expect(FakeRequest.sent[0]?.isAborted).toBe(true);
});
