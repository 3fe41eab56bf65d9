/** Lines of a catalogue file put together by model, and judged against the catalogue. Pure. */
import {
  CONSTANT_KEYS,
  lensInputSchema,
  type Lens,
  type LensImportResult,
  type LensInput,
  type LensRowOutcome,
  type RowProblem,
} from '@/shared/contract';
import { changedFields } from './lens-compare';
import { columnOf, type LensColumn, type LensFacts, type LensRow } from './read-lens-row';

export interface ModelVerdict {
  rows: LensRow[];
  outcome: LensRowOutcome;
  summary: string;
  /** What would be stored; absent when a line is refused. */
  input: LensInput | undefined;
  stored: Lens | undefined;
}

export function judgeLensRows(rows: readonly LensRow[], catalogue: readonly Lens[]): ModelVerdict[] {
  const byName = new Map<string, LensRow[]>();
  for (const row of rows) {
    const key = row.name.toLowerCase();
    byName.set(key, [...(byName.get(key) ?? []), row]);
  }
  return [...byName].map(([key, ofModel]) =>
    judgeModel(
      ofModel,
      catalogue.find(({ name }) => name.toLowerCase() === key),
    ),
  );
}

export function toResultRows(verdicts: readonly ModelVerdict[]): LensImportResult['rows'] {
  return verdicts
    .flatMap(({ rows, outcome, summary }) =>
      rows.map(({ row, name, problems }) => ({
        row,
        name,
        outcome,
        summary: outcome === 'refused' && problems.length === 0 ? SIBLING_REFUSED : summary,
        problems,
      })),
    )
    .sort((a, b) => a.row - b.row);
}

const SIBLING_REFUSED = 'not stored: another line of this model is refused';

function judgeModel(rows: LensRow[], stored: Lens | undefined): ModelVerdict {
  const [first] = rows;
  if (!first) throw new Error('A model without lines');
  for (const row of rows.slice(1)) refuseContradiction(row, first);
  const parsed = lensInputSchema.safeParse(assemble(rows, stored));
  if (!parsed.success) {
    for (const issue of parsed.error.issues) addIssue(rows, issue.path, issue.message);
  }
  if (!parsed.success || rows.some(({ problems }) => problems.length > 0)) {
    return { rows, outcome: 'refused', summary: 'not stored', input: undefined, stored };
  }
  const input = parsed.data;
  if (!stored) return { rows, outcome: 'created', summary: 'new model', input, stored };
  const changed = changedFields(stored, input);
  return changed.length === 0
    ? { rows, outcome: 'already-there', summary: 'nothing changes', input, stored }
    : { rows, outcome: 'changed', summary: `changes ${changed.map(inWords).join(', ')}`, input, stored };
}

/** One model, one set of facts; and one line per origin. */
function refuseContradiction(row: LensRow, first: LensRow): void {
  for (const field of Object.keys(first.facts) as (keyof LensFacts)[]) {
    if (JSON.stringify(row.facts[field]) === JSON.stringify(first.facts[field])) continue;
    const column = columnOf([field]);
    row.problems.push({ column, value: '', message: `Differs from row ${first.row} of the same model` });
  }
  if (row.origin === first.origin) {
    const message = `Row ${first.row} gives constants of this origin already`;
    row.problems.push({ column: 'constants_origin', value: row.origin ?? '', message });
  }
}

/** Constants of an origin that the file does not mention stay as they are. */
function assemble(rows: readonly LensRow[], stored: Lens | undefined): Record<keyof LensInput, unknown> {
  const origins = new Set(rows.map(({ origin }) => origin));
  const kept = stored?.constants.filter(({ origin }) => !origins.has(origin)) ?? [];
  return {
    ...rows[0]?.facts,
    constants: [...rows.flatMap(({ constants }) => constants), ...kept],
    isRetired: stored?.isRetired ?? false,
  } as Record<keyof LensInput, unknown>;
}

/** A problem of the whole model stands in its first line, unless a line has said the same already. */
function addIssue(rows: readonly LensRow[], path: readonly PropertyKey[], message: string): void {
  const column = path[0] === 'constants' ? constantColumn(rows, path) : columnOf(path);
  const [first] = rows;
  const isKnown = rows.some(({ problems }) => problems.some((problem) => problem.column === column));
  if (first && !isKnown) first.problems.push({ column, value: '', message } satisfies RowProblem);
}

function constantColumn(rows: readonly LensRow[], path: readonly PropertyKey[]): LensColumn {
  if (path.length === 1) return 'constants_origin';
  const constant = rows.flatMap(({ constants }) => constants)[Number(path[1])];
  if (path[2] === 'dated') return 'constants_dated';
  if (path[2] !== 'values' || !constant) return 'constants_source';
  return CONSTANT_KEYS[constant.formula].length > 1 ? 'haigis_a0_mm' : SINGLE_COLUMNS[constant.formula];
}

const SINGLE_COLUMNS: Record<LensInput['constants'][number]['formula'], LensColumn> = {
  srkt: 'a_constant',
  t2: 't2_a_constant',
  holladay1: 'surgeon_factor_mm',
  hofferQ: 'pacd_mm',
  haigis: 'haigis_a0_mm',
};

function inWords(field: keyof LensInput): string {
  return field.replace(/D$/, '').replace(/([A-Z])/g, (letter) => ` ${letter.toLowerCase()}`);
}
