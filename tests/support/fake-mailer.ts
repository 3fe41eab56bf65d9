import type { Mail, Mailer } from '@/server/mail/mailer';

export interface FakeMailer extends Mailer {
  sent: Mail[];
}

export function fakeMailer(): FakeMailer {
  const sent: Mail[] = [];
  return { sent, send: async (mail) => void sent.push(mail), close: async () => undefined };
}
