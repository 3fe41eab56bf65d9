import { col, fn, Op, QueryTypes, where, type Transaction, type WhereOptions } from 'sequelize';
import type { Patient, PatientInput } from '@/shared/contract';
import { insertRows } from '@/server/db/insert-rows';
import { PatientModel } from '@/server/db/models/patient';
import { searchKeyOf, type SearchTerm } from './search';

export interface NewPatient extends PatientInput {
  id: string;
  isDemo: boolean;
}

const ATTRIBUTES = [
  'id',
  'recordNumber',
  'familyName',
  'givenName',
  'birthDate',
  'sex',
  'searchKey',
  'isDemo',
  'version',
  'createdAt',
  'updatedAt',
] as const;

export async function addPatients(
  patients: readonly NewPatient[],
  at: string,
  transaction: Transaction,
): Promise<void> {
  const rows = patients.map((patient) => [
    patient.id,
    patient.recordNumber,
    patient.familyName,
    patient.givenName,
    patient.birthDate,
    patient.sex,
    searchKeyOf(patient),
    Number(patient.isDemo),
    0,
    at,
    at,
  ]);
  await insertRows(PatientModel, { attributes: ATTRIBUTES, rows, transaction });
}

export async function findPatient(id: string, transaction?: Transaction): Promise<Patient | undefined> {
  return optional(await PatientModel.findByPk(id, { transaction }));
}

export async function findPatientByRecordNumber(
  recordNumber: string,
  transaction: Transaction,
): Promise<Patient | undefined> {
  return optional(await PatientModel.findOne({ where: { recordNumber }, transaction }));
}

export async function changePatient(
  id: string,
  { at, ...input }: PatientInput & { at: string },
  transaction: Transaction,
): Promise<Patient> {
  const row = await PatientModel.findByPk(id, { transaction, rejectOnEmpty: true });
  return toPatient(
    await row.update({ ...input, searchKey: searchKeyOf(input), updatedAt: at }, { transaction }),
  );
}

/** Patients in the order of their folded names, from the one after the patient `after`. */
export async function listPatientsAfter(
  terms: readonly SearchTerm[],
  after: string | undefined,
  count: number,
): Promise<Patient[]> {
  const last = after === undefined ? null : await PatientModel.findByPk(after);
  const beyond: WhereOptions = last
    ? {
        [Op.or]: [
          { searchKey: { [Op.gt]: last.searchKey } },
          { searchKey: last.searchKey, id: { [Op.gt]: last.id } },
        ],
      }
    : {};
  const rows = await PatientModel.findAll({
    where: { [Op.and]: [...terms.map(matches), beyond] },
    order: ['searchKey', 'id'],
    limit: count,
  });
  return rows.map(toPatient);
}

export async function countPatients(terms: readonly SearchTerm[]): Promise<number> {
  return PatientModel.count({ where: { [Op.and]: terms.map(matches) } });
}

/** People born on that day whose folded name begins so; few, and the caller looks closer. */
export async function listWithNameAndBirthDate(
  { namePrefix, birthDate }: { namePrefix: string; birthDate: string },
  transaction: Transaction,
): Promise<Patient[]> {
  const hasPrefix = where(fn('instr', col('search_key'), namePrefix), 1);
  const rows = await PatientModel.findAll({ where: { [Op.and]: [{ birthDate }, hasPrefix] }, transaction });
  return rows.map(toPatient);
}

export async function listPatientsByRecordNumber(
  recordNumbers: readonly string[],
  transaction?: Transaction,
): Promise<Patient[]> {
  return listWhereIn('record_number', recordNumbers, transaction);
}

export async function listPatientsByBirthDate(
  birthDates: readonly string[],
  transaction?: Transaction,
): Promise<Patient[]> {
  return listWhereIn('birth_date', birthDates, transaction);
}

export async function listPatientsById(
  ids: readonly string[],
  transaction?: Transaction,
): Promise<Patient[]> {
  return listWhereIn('id', ids, transaction);
}

/** Thousands of values travel as one JSON text; a list of parameters has its limit. */
async function listWhereIn(
  column: 'id' | 'record_number' | 'birth_date',
  values: readonly string[],
  transaction: Transaction | undefined,
): Promise<Patient[]> {
  if (values.length === 0) return [];
  const rows = await PatientModel.sequelize?.query(
    `SELECT id, record_number AS recordNumber, family_name AS familyName, given_name AS givenName,
       birth_date AS birthDate, sex, is_demo AS isDemo, created_at AS createdAt, version
     FROM patients WHERE ${column} IN (SELECT value FROM json_each($1))`,
    { bind: [JSON.stringify(values)], transaction, type: QueryTypes.SELECT },
  );
  return (rows as PatientRow[]).map((row) => ({ ...row, isDemo: row.isDemo === 1 }));
}

type PatientRow = Omit<Patient, 'isDemo'> & { isDemo: 0 | 1 };

function matches({ word, birthDate }: SearchTerm): WhereOptions {
  const inName = where(fn('instr', col('search_key'), word), { [Op.gt]: 0 });
  return birthDate === undefined ? inName : { [Op.or]: [inName, { birthDate }] };
}

const optional = (row: PatientModel | null): Patient | undefined => (row ? toPatient(row) : undefined);

function toPatient(row: PatientModel): Patient {
  const { id, recordNumber, familyName, givenName, birthDate, sex, isDemo, createdAt, version } = row;
  return { id, recordNumber, familyName, givenName, birthDate, sex, isDemo, createdAt, version };
}
