/** The lens catalogue. A model is retired, never deleted; a changed constant leaves the old one in its history. */
import type { Lens, LensConstant, LensDetail, LensInput } from '@/shared/contract';
import type { Act } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Transaction } from '@/server/db/write-queue';
import { requireVersion } from '@/server/http/etag';
import { ProblemError, takenField } from '@/server/http/problem';
import { changedFields, constantText } from './lens-compare';
import {
  addConstant,
  addLens,
  changeLens,
  closeConstant,
  findLens,
  listAllLenses,
  listConstantHistory,
} from './lens.repository';

/** All models, retired ones too, by name. */
export const listLenses = (transaction?: Transaction): Promise<Lens[]> => listAllLenses(transaction);

export async function getLens(id: string, transaction?: Transaction): Promise<Lens> {
  const lens = await findLens(id, transaction);
  if (!lens) throw new ProblemError('not-found');
  return lens;
}

export async function getLensDetail(id: string, transaction?: Transaction): Promise<LensDetail> {
  const lens = await getLens(id, transaction);
  return { ...lens, constantHistory: await listConstantHistory(id, transaction) };
}

export async function createLens(
  act: Act,
  { constants, ...facts }: LensInput,
  { isDemo }: { isDemo: boolean },
): Promise<LensDetail> {
  await refuseTakenName(act, facts.name);
  const id = act.newId();
  await addLens({ ...facts, id, isDemo, at: act.at }, act.transaction);
  await replaceConstants(act, id, { before: [], after: constants });
  const lens = await getLensDetail(id, act.transaction);
  await recordAudit(act, {
    action: 'lens.create',
    noun: 'lens',
    nounId: id,
    version: lens.version,
    detail: { name: lens.name },
  });
  return lens;
}

export interface LensChange {
  id: string;
  ifMatch: number;
  input: LensInput;
}

export async function changeLensAsSeen(act: Act, { id, ifMatch, input }: LensChange): Promise<LensDetail> {
  const stored = await getLens(id, act.transaction);
  requireVersion(ifMatch, stored.version, stored);
  return updateLens(act, stored, input);
}

/** The caller has made sure that `stored` is what is stored. */
export async function updateLens(act: Act, stored: Lens, input: LensInput): Promise<LensDetail> {
  const { id } = stored;
  const changed = changedFields(stored, input);
  if (changed.length === 0) return getLensDetail(id, act.transaction);
  if (changed.includes('name')) await refuseTakenName(act, input.name, id);
  const { constants, ...facts } = input;
  await changeLens(id, { ...facts, at: act.at }, act.transaction);
  await replaceConstants(act, id, { before: stored.constants, after: constants });
  const lens = await getLensDetail(id, act.transaction);
  await recordAudit(act, {
    action: 'lens.change',
    noun: 'lens',
    nounId: id,
    version: lens.version,
    detail: { before: pick(stored, changed), after: pick(input, changed) },
  });
  return lens;
}

async function replaceConstants(
  act: Act,
  lensId: string,
  { before, after }: { before: readonly LensConstant[]; after: readonly LensConstant[] },
): Promise<void> {
  const [old, wanted] = [new Set(before.map(constantText)), new Set(after.map(constantText))];
  for (const constant of before) {
    if (!wanted.has(constantText(constant)))
      await closeConstant(lensId, { ...constant, at: act.at }, act.transaction);
  }
  for (const constant of after) {
    if (old.has(constantText(constant))) continue;
    const recorded = { recordedAt: act.at, recordedBy: act.actor.id };
    await addConstant({ ...constant, ...recorded, id: act.newId(), lensId }, act.transaction);
  }
}

async function refuseTakenName(act: Act, name: string, ownId?: string): Promise<void> {
  const lenses = await listAllLenses(act.transaction);
  const other = lenses.find((lens) => lens.id !== ownId && lens.name.toLowerCase() === name.toLowerCase());
  if (other) throw takenField('name', `There is a model called ${other.name} already`);
}

function pick(lens: LensInput, fields: readonly (keyof LensInput)[]): Partial<LensInput> {
  return Object.fromEntries(fields.map((field) => [field, lens[field]]));
}
