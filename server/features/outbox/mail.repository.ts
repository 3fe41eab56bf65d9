import { Op, type Transaction } from 'sequelize';
import type { OutboxMail } from '@/shared/contract';
import { MailModel } from '@/server/db/models/mail';

export async function addMail(mail: OutboxMail, transaction: Transaction): Promise<void> {
  await MailModel.create(mail, { transaction });
}

/** Mails from the newest on, from the one after `after`. */
export async function listMailsAfter(
  after: readonly [sentAt: string, id: string] | undefined,
  count: number,
): Promise<OutboxMail[]> {
  const [sentAt, id] = after ?? [];
  const beyond = { [Op.or]: [{ sentAt: { [Op.lt]: sentAt } }, { sentAt, id: { [Op.lt]: id } }] };
  const rows = await MailModel.findAll({
    where: after ? beyond : {},
    order: [
      ['sentAt', 'DESC'],
      ['id', 'DESC'],
    ],
    limit: count,
  });
  return rows.map((row) => row.get());
}
