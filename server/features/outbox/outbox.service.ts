/** The mails that the local fake of the mail service took in. */
import { z } from 'zod';
import type { OutboxMail, Page } from '@/shared/contract';
import type { Clock, Random } from '@/server/clock';
import type { Database } from '@/server/db/connection';
import { decodeCursor, toPage } from '@/server/http/paging';
import { startLocalMailServer } from '@/server/mail/local-mail-server';
import { createMailer, type Mail, type Mailer } from '@/server/mail/mailer';
import { addMail, listMailsAfter } from './mail.repository';

export interface OutboxDeps {
  db: Database;
  clock: Clock;
  random: Random;
}

/** A mailer whose mails travel by SMTP to this process and end in the outbox. */
export async function createOutboxMailer(deps: OutboxDeps): Promise<Mailer> {
  const server = await startLocalMailServer((mail) => keepMail(deps, mail));
  return createMailer(server.url, server.close);
}

function keepMail({ db, clock, random }: OutboxDeps, mail: Mail): Promise<void> {
  const kept = { ...mail, id: random.uuid(), sentAt: clock.now().toISOString() };
  return db.inWrite((transaction) => addMail(kept, transaction));
}

export async function listMails(
  limit: number | undefined,
  after: string | undefined,
): Promise<Page<OutboxMail>> {
  const from = decodeCursor(after, z.tuple([z.string(), z.string()]));
  return toPage({
    limit,
    fetch: (count) => listMailsAfter(from, count),
    toItem: (mail) => mail,
    cursorOf: ({ sentAt, id }) => [sentAt, id],
  });
}
