import type { Transaction } from 'sequelize';
import { SettingModel } from '@/server/db/models/setting';

export async function findSetting(key: string, transaction?: Transaction): Promise<unknown> {
  const row = await SettingModel.findByPk(key, { transaction });
  return row?.value;
}

export async function storeSetting(key: string, value: unknown, transaction: Transaction): Promise<void> {
  await SettingModel.upsert({ key, value }, { transaction });
}

export async function removeSetting(key: string, transaction: Transaction): Promise<void> {
  await SettingModel.destroy({ where: { key }, transaction });
}
