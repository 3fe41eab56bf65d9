import type { Database } from '@/server/db/connection';
import { SettingModel } from '@/server/db/models/setting';

/** True when a row can be written and read back. Each call waits its turn in the write queue. */
export async function canWrite(db: Database): Promise<boolean> {
  return db.inWrite(async (transaction) => {
    const key = 'write-test';
    await SettingModel.upsert({ key, value: true }, { transaction });
    const row = await SettingModel.findByPk(key, { transaction });
    return row?.value === true;
  });
}
