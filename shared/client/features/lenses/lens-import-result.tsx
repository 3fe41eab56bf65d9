/** What a catalogue file does, line by line. */
import type { LensImportResult } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { Mark } from '@/shared/client/components/mark';
import type { MarkTone } from '@/shared/client/components/mark';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';

type ResultRow = LensImportResult['rows'][number];

const OUTCOMES: Record<ResultRow['outcome'], { tone: MarkTone; label: string }> = {
  created: { tone: 'fair', label: 'new' },
  changed: { tone: 'weigh', label: 'changes' },
  'already-there': { tone: 'note', label: 'already there' },
  refused: { tone: 'stop', label: 'refused' },
};

const COLUMNS: Column<ResultRow>[] = [
  { key: 'name', title: 'Model', share: 1.4, render: (row) => row.name || '—' },
  { key: 'row', title: 'Row', share: 0.4, isNumber: true, render: (row) => String(row.row) },
  { key: 'outcome', title: 'What happens', render: (row) => <Mark {...OUTCOMES[row.outcome]} /> },
  { key: 'summary', title: 'Why', share: 2.4, render: (row) => wordsOf(row) },
];

export function LensImportResultView({ result }: { result: LensImportResult }) {
  const { created, changed, alreadyThere, refused } = result.counts;
  return (
    <>
      {result.problems.length > 0 ? (
        <Card tone="stop" title="This file cannot be read">
          {result.problems.map((problem) => (
            <Text key={problem.message}>{`▪ ${problem.message}`}</Text>
          ))}
        </Card>
      ) : (
        <Text variant="strong">{`${created} new, ${changed} changed, ${alreadyThere} already there, ${refused} refused`}</Text>
      )}
      {refused > 0 ? (
        <Text color="stop">
          Nothing is stored while a line is refused: correct the file and drop it again.
        </Text>
      ) : null}
      {result.rows.length > 0 ? (
        <DataTable
          label="Lines of the file"
          columns={COLUMNS}
          items={result.rows}
          keyOf={(row) => String(row.row)}
        />
      ) : null}
    </>
  );
}

function wordsOf(row: ResultRow): string {
  if (row.problems.length === 0) return row.summary;
  return row.problems.map((problem) => `${problem.column} "${problem.value}": ${problem.message}`).join('; ');
}
