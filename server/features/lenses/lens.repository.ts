import { Op, type Transaction } from 'sequelize';
import {
  FORMULA_IDS,
  type Lens,
  type LensConstant,
  type LensInput,
  type RecordedConstant,
} from '@/shared/contract';
import { AccountModel } from '@/server/db/models/account';
import { LensModel } from '@/server/db/models/lens';
import { LensConstantModel } from '@/server/db/models/lens-constant';
import { columnList, selectRows } from '@/server/db/select-rows';

export type LensFacts = Omit<LensInput, 'constants'>;

/** Every model with the constants in use, by name. */
export async function listAllLenses(transaction?: Transaction): Promise<Lens[]> {
  const [rows, constants] = await Promise.all([
    selectRows<StoredLens>(LensModel, {
      sql: `SELECT ${columnList(LensModel, LENS_ATTRIBUTES)} FROM lenses ORDER BY name, id`,
      bind: [],
      transaction,
    }),
    selectRows<StoredConstant>(LensConstantModel, {
      sql: `SELECT ${columnList(LensConstantModel, CONSTANT_ATTRIBUTES)} FROM lens_constants WHERE replaced_at IS NULL`,
      bind: [],
      transaction,
    }),
  ]);
  const byLens = new Map<string, StoredConstant[]>(rows.map(({ id }) => [id, []]));
  for (const constant of constants) byLens.get(constant.lensId)?.push(constant);
  return rows.map((row) => toLens(readLens(row), (byLens.get(row.id) ?? []).map(readConstant)));
}

const LENS_ATTRIBUTES = [
  'id',
  'name',
  'kind',
  'isToric',
  'design',
  'powerRanges',
  'cylinderStepsD',
  'remarks',
  'isRetired',
  'isDemo',
  'version',
] as const;
const CONSTANT_ATTRIBUTES = ['lensId', 'formula', 'origin', 'values', 'source', 'dated'] as const;
type LensFields = Pick<LensModel, (typeof LENS_ATTRIBUTES)[number]>;
type ConstantFields = Pick<LensConstantModel, (typeof CONSTANT_ATTRIBUTES)[number]>;
/** As the columns hold them. */
type StoredLens = Omit<LensFields, 'isToric' | 'isRetired' | 'isDemo' | 'powerRanges' | 'cylinderStepsD'> &
  Record<'isToric' | 'isRetired' | 'isDemo', 0 | 1> &
  Record<'powerRanges' | 'cylinderStepsD', string>;
type StoredConstant = Omit<ConstantFields, 'values'> & { values: string };

const readLens = (row: StoredLens): LensFields => ({
  ...row,
  isToric: row.isToric === 1,
  isRetired: row.isRetired === 1,
  isDemo: row.isDemo === 1,
  powerRanges: JSON.parse(row.powerRanges) as LensFields['powerRanges'],
  cylinderStepsD: JSON.parse(row.cylinderStepsD) as LensFields['cylinderStepsD'],
});
const readConstant = (row: StoredConstant): ConstantFields => ({
  ...row,
  values: JSON.parse(row.values) as ConstantFields['values'],
});

export async function findLens(id: string, transaction?: Transaction): Promise<Lens | undefined> {
  const row = await LensModel.findByPk(id, { transaction });
  if (!row) return undefined;
  const constants = await LensConstantModel.findAll({ where: { lensId: id, replacedAt: null }, transaction });
  return toLens(row, constants);
}

export async function addLens(
  { id, isDemo, at, ...facts }: LensFacts & { id: string; isDemo: boolean; at: string },
  transaction: Transaction,
): Promise<void> {
  await LensModel.create({ ...facts, id, isDemo, createdAt: at, updatedAt: at }, { transaction });
}

/** Counts the version up even when only constants change, which stand in rows of their own. */
export async function changeLens(
  id: string,
  { at, ...facts }: LensFacts & { at: string },
  transaction: Transaction,
): Promise<void> {
  const row = await LensModel.findByPk(id, { transaction, rejectOnEmpty: true });
  row.set({ ...facts, updatedAt: at });
  row.changed('updatedAt', true);
  await row.save({ transaction });
}

export interface ConstantRecord extends LensConstant {
  id: string;
  lensId: string;
  recordedAt: string;
  /** Account id. */
  recordedBy: string;
}

export async function addConstant(record: ConstantRecord, transaction: Transaction): Promise<void> {
  await LensConstantModel.create(record, { transaction });
}

/** The row stays, with the moment from which it was no longer in use. */
export async function closeConstant(
  lensId: string,
  { formula, origin, at }: Pick<LensConstant, 'formula' | 'origin'> & { at: string },
  transaction: Transaction,
): Promise<void> {
  const where = { lensId, formula, origin, replacedAt: null };
  await LensConstantModel.update({ replacedAt: at }, { where, transaction });
}

export async function listConstantHistory(
  lensId: string,
  transaction?: Transaction,
): Promise<RecordedConstant[]> {
  const rows = await LensConstantModel.findAll({
    where: { lensId },
    order: [['recordedAt', 'DESC']],
    transaction,
  });
  const people = await AccountModel.findAll({
    attributes: ['id', 'displayName'],
    where: { id: { [Op.in]: rows.map(({ recordedBy }) => recordedBy) } },
    transaction,
  });
  const names = new Map(people.map(({ id, displayName }) => [id, displayName]));
  return rows.map((row) => ({
    ...toConstant(row),
    recordedAt: row.recordedAt,
    recordedBy: names.get(row.recordedBy) ?? '',
    replacedAt: row.replacedAt,
  }));
}

function toLens(row: LensFields, constants: readonly ConstantFields[]): Lens {
  const {
    id,
    name,
    kind,
    isToric,
    design,
    powerRanges,
    cylinderStepsD,
    remarks,
    isRetired,
    isDemo,
    version,
  } = row;
  return {
    id,
    name,
    kind,
    isToric,
    design,
    powerRanges,
    cylinderStepsD,
    constants: constants.map(toConstant).sort(byOriginAndFormula),
    remarks,
    isRetired,
    isDemo,
    version,
  };
}

function toConstant({ formula, origin, values, source, dated }: ConstantFields): LensConstant {
  return { formula, origin, values, source, dated };
}

function byOriginAndFormula(a: LensConstant, b: LensConstant): number {
  if (a.origin !== b.origin) return a.origin < b.origin ? -1 : 1;
  return FORMULA_IDS.indexOf(a.formula) - FORMULA_IDS.indexOf(b.formula);
}
