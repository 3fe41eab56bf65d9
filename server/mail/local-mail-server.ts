/**
 * Stands in for a mail service: an SMTP server on the loopback address that hands over what it receives.
 * It reads what our own mailer writes (one base64 text part), no other mail.
 */
import type { AddressInfo } from 'node:net';
import { text as readText } from 'node:stream/consumers';
import { SMTPServer } from 'smtp-server';
import type { Mail } from '@/server/mail/mailer';

export interface LocalMailServer {
  url: string;
  close(): Promise<void>;
}

export async function startLocalMailServer(receive: (mail: Mail) => Promise<void>): Promise<LocalMailServer> {
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    logger: false,
    onData(stream, session, done) {
      const to = session.envelope.rcptTo.map(({ address }) => address).join(', ');
      readText(stream)
        .then((source) => receive({ to, ...readMail(source) }))
        .then(
          () => done(),
          (error: unknown) => done(error instanceof Error ? error : new Error('The mail was not taken')),
        );
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.on('error', reject);
    server.listen(0, '127.0.0.1', resolve);
  });
  const { port } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${port}`,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

function readMail(source: string): { subject: string; text: string } {
  const end = source.indexOf('\r\n\r\n');
  const headers = source.slice(0, end).replace(/\r\n[ \t]+/g, ' ');
  const subject = /^Subject: (.*)$/im.exec(headers)?.[1] ?? '';
  return { subject, text: Buffer.from(source.slice(end), 'base64').toString('utf8') };
}
