/** Patients: list and search, registering, correcting. */
import { z } from 'zod';
import {
  formatPatientName,
  idSchema,
  localDateOf,
  SIDES,
  type Page,
  type Patient,
  type PatientDetail,
  type PatientInput,
  type PatientListItem,
} from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Clock } from '@/server/clock';
import type { Transaction } from '@/server/db/write-queue';
import { listEyesOfPatients } from '@/server/features/eyes/eye-record.service';
import { findStandings } from '@/server/features/eyes/eye-standing.service';
import { requireVersion } from '@/server/http/etag';
import { decodeCursor, toPage } from '@/server/http/paging';
import { takenField } from '@/server/http/problem';
import { getPatient, registerPatients } from './patient-record.service';
import {
  changePatient,
  countPatients,
  findPatientByRecordNumber,
  listPatientsAfter,
  listWithNameAndBirthDate,
} from './patient.repository';
import { foldText, identityKeyOf, searchTerms } from './search';

export interface PatientQuery {
  search?: string;
  limit?: number;
  after?: string;
}

export async function listPatients(
  clock: Clock,
  { search, limit, after }: PatientQuery,
): Promise<Page<PatientListItem>> {
  const terms = searchTerms(search);
  const [afterId] = decodeCursor(after, z.tuple([idSchema])) ?? [];
  const page = await toPage({
    limit,
    fetch: (count) => listPatientsAfter(terms, afterId, count),
    toItem: (patient) => patient,
    cursorOf: ({ id }) => [id],
  });
  const today = localDateOf(clock.now());
  return { ...page, items: await withStages(page.items, today), total: await countPatients(terms) };
}

/** One patient, as somebody looks at the record. */
export async function viewPatient(act: Act, id: string): Promise<PatientDetail> {
  const patient = await getPatient(id, act.transaction);
  const about = { noun: 'patient', nounId: id, patientId: id, version: patient.version };
  await recordAudit(act, { ...about, action: 'patient.view' });
  return toDetail(act, patient);
}

export async function registerPatient(
  act: Act,
  input: PatientInput,
  { isDemo }: { isDemo: boolean },
): Promise<PatientDetail> {
  await refuseTakenRecordNumber(act, input);
  const id = act.newId();
  await registerPatients(act, [{ ...input, id, isDemo }]);
  return toDetail(act, await getPatient(id, act.transaction));
}

export interface PatientCorrection {
  id: string;
  ifMatch: number;
  input: PatientInput;
}

export async function correctPatient(
  act: Act,
  { id, ifMatch, input }: PatientCorrection,
): Promise<PatientDetail> {
  const stored = await getPatient(id, act.transaction);
  requireVersion(ifMatch, stored.version, stored);
  const changed = FIELDS.filter((field) => stored[field] !== input[field]);
  if (changed.length === 0) return toDetail(act, stored);
  if (changed.includes('recordNumber')) await refuseTakenRecordNumber(act, input);
  const patient = await changePatient(id, { ...input, at: act.at }, act.transaction);
  await recordAudit(act, {
    action: 'patient.correct',
    noun: 'patient',
    nounId: id,
    patientId: id,
    version: patient.version,
    detail: { before: pick(stored, changed), after: pick(input, changed) },
  });
  return toDetail(act, patient);
}

const FIELDS = ['recordNumber', 'familyName', 'givenName', 'birthDate', 'sex'] as const;

function pick(patient: PatientInput, fields: readonly (keyof PatientInput)[]): Partial<PatientInput> {
  return Object.fromEntries(fields.map((field) => [field, patient[field]]));
}

async function refuseTakenRecordNumber(act: Act, { recordNumber }: PatientInput): Promise<void> {
  const other = await findPatientByRecordNumber(recordNumber, act.transaction);
  if (!other) return;
  const owner = `${formatPatientName(other)}, born ${other.birthDate}`;
  throw takenField('recordNumber', `Record number ${recordNumber} belongs to ${owner}`);
}

async function toDetail(act: Act, patient: Patient): Promise<PatientDetail> {
  const today = localDateOf(new Date(act.at));
  const [item] = await withStages([patient], today, act.transaction);
  const namePrefix = foldText(`${patient.familyName} ${patient.givenName}`);
  const alike = await listWithNameAndBirthDate({ namePrefix, birthDate: patient.birthDate }, act.transaction);
  const possibleDuplicates = alike
    .filter((other) => other.id !== patient.id && identityKeyOf(other) === identityKeyOf(patient))
    .map(({ id, recordNumber, familyName, givenName }) => ({ id, recordNumber, familyName, givenName }));
  return { ...patient, eyes: item?.eyes ?? [], possibleDuplicates };
}

async function withStages(
  patients: readonly Patient[],
  today: string,
  transaction?: Transaction,
): Promise<PatientListItem[]> {
  const ids = patients.map(({ id }) => id);
  const eyes = await listEyesOfPatients(ids, transaction);
  const standings = await findStandings({ eyes, today }, transaction);
  return patients.map((patient) => ({
    ...patient,
    eyes: SIDES.flatMap((side) =>
      standings
        .filter(({ eye }) => eye.patientId === patient.id && eye.side === side)
        .map(({ stage, waitsFor }) => ({ side, stage, waitsFor })),
    ),
  }));
}
