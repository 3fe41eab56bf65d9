/** Every set of constants that ever was in use: who recorded it, from when until when. */
import { FORMULA_NAMES } from '@/shared/contract';
import type { LensDetail, RecordedConstant } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { formatDate, formatInstant } from '@/shared/client/lib/format';
import { CONSTANT_LABELS } from './lens-form-values';

const COLUMNS: Column<RecordedConstant>[] = [
  { key: 'formula', title: 'Formula', render: (set) => `${FORMULA_NAMES[set.formula]}, ${set.origin}` },
  { key: 'values', title: 'Values', share: 1.4, isNumber: true, render: valuesOf },
  { key: 'source', title: 'Whose', share: 1.6, render: (set) => `${set.source}, ${formatDate(set.dated)}` },
  {
    key: 'recorded',
    title: 'Recorded',
    share: 1.4,
    render: (set) => `${formatInstant(set.recordedAt)}, ${set.recordedBy}`,
  },
  {
    key: 'until',
    title: 'In use until',
    render: (set) => (set.replacedAt ? formatInstant(set.replacedAt) : 'now in use'),
  },
];

export function ConstantHistory({ lens }: { lens: LensDetail }) {
  if (lens.constantHistory.length === 0) return null;
  return (
    <Card title="History of the constants">
      <DataTable
        label="History of the constants"
        columns={COLUMNS}
        items={lens.constantHistory}
        keyOf={(set) => `${set.formula} ${set.origin} ${set.recordedAt}`}
      />
    </Card>
  );
}

/** `A-constant 118.9` */
export function valuesOf({ values }: { values: RecordedConstant['values'] }): string {
  return Object.entries(values)
    .map(([key, value]) => `${CONSTANT_LABELS[key] ?? key} ${String(value)}`)
    .join(', ');
}
