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

/** Every model with the constants in use, by name. One row each: a catalogue has ten times as many constants. */
export async function listAllLenses(transaction?: Transaction): Promise<Lens[]> {
  const constants = `SELECT json_group_array(json_object('formula', c.formula, 'origin', c.origin,
      'values', json(c."values"), 'source', c.source, 'dated', c.dated))
    FROM lens_constants c WHERE c.lens_id = l.id AND c.replaced_at IS NULL`;
  const rows = await selectRows<LensRow>(LensModel, {
    sql: `SELECT ${columnList(LensModel, LENS_ATTRIBUTES, 'l')}, (${constants}) AS constants
      FROM lenses l ORDER BY l.name, l.id`,
    bind: [],
    transaction,
  });
  return rows.map(fromRow);
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
type LensFields = Pick<LensModel, (typeof LENS_ATTRIBUTES)[number]>;
/** As the columns hold it: JSON as text, booleans as numbers. */
type LensRow = Omit<LensFields, 'isToric' | 'isRetired' | 'isDemo' | 'powerRanges' | 'cylinderStepsD'> &
  Record<'isToric' | 'isRetired' | 'isDemo', 0 | 1> &
  Record<'powerRanges' | 'cylinderStepsD' | 'constants', string>;

function fromRow({ constants, ...row }: LensRow): Lens {
  const fields: LensFields = {
    ...row,
    isToric: row.isToric === 1,
    isRetired: row.isRetired === 1,
    isDemo: row.isDemo === 1,
    powerRanges: JSON.parse(row.powerRanges) as Lens['powerRanges'],
    cylinderStepsD: JSON.parse(row.cylinderStepsD) as number[],
  };
  return toLens(fields, JSON.parse(constants) as LensConstant[]);
}

export async function findLens(id: string, transaction?: Transaction): Promise<Lens | undefined> {
  const row = await LensModel.findByPk(id, { transaction });
  if (!row) return undefined;
  const constants = await LensConstantModel.findAll({ where: { lensId: id, replacedAt: null }, transaction });
  return toLens(row, constants.map(toConstant));
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

function toLens(row: LensFields, constants: readonly LensConstant[]): Lens {
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
    constants: [...constants].sort(byOriginAndFormula),
    remarks,
    isRetired,
    isDemo,
    version,
  };
}

function toConstant({ formula, origin, values, source, dated }: LensConstantModel): LensConstant {
  return { formula, origin, values, source, dated };
}

function byOriginAndFormula(a: LensConstant, b: LensConstant): number {
  if (a.origin !== b.origin) return a.origin < b.origin ? -1 : 1;
  return FORMULA_IDS.indexOf(a.formula) - FORMULA_IDS.indexOf(b.formula);
}
