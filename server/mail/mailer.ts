/** Sends mail by SMTP: to the practice's own service, or to the local fake that keeps it in the outbox. */
import { createTransport } from 'nodemailer';

export interface Mail {
  to: string;
  subject: string;
  text: string;
}

export interface Mailer {
  send(mail: Mail): Promise<void>;
  close(): Promise<void>;
}

const FROM = 'Landfall <no-reply@landfall.example>';

export function createMailer(smtpUrl: string, onClose: () => Promise<void> = async () => undefined): Mailer {
  const transport = createTransport(smtpUrl, {
    from: FROM,
    // One plain encoding for every text, so that what arrives can be read back exactly.
    textEncoding: 'base64',
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    send: async ({ to, subject, text }) => {
      // As an object the address is taken as it stands: one recipient, whatever is in the text.
      await transport.sendMail({ to: { name: '', address: to }, subject, text });
    },
    close: async () => {
      transport.close();
      await onClose();
    },
  };
}
