/** The texts of the mails that carry a link to set a password. */
import type { Mail } from '@/server/mail/mailer';

export interface PasswordMail {
  kind: 'invitation' | 'reset';
  to: string;
  displayName: string;
  practiceName: string;
  link: string;
}

export function passwordMail({ kind, to, displayName, practiceName, link }: PasswordMail): Mail {
  const { subject, why, until, otherwise } = TEXTS[kind];
  const text = [
    `Dear ${displayName},`,
    why(practiceName),
    `Choose your password here:\n${link}`,
    `${until} It can be used once. ${otherwise}`,
  ].join('\n\n');
  return { to, subject, text };
}

const TEXTS = {
  invitation: {
    subject: 'Your account in Landfall',
    why: (practice: string) => `an account in Landfall was made for you at ${practice}.`,
    until: 'The link holds for 72 hours.',
    otherwise: 'If you do not know why you get this mail, do nothing.',
  },
  reset: {
    subject: 'A new password for Landfall',
    why: (practice: string) => `somebody asked for a new password for your account at ${practice}.`,
    until: 'The link holds for one hour.',
    otherwise: 'If it was not you, do nothing: your password stays as it is.',
  },
};
