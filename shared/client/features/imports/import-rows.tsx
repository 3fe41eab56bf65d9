/** The rows of a file by outcome; refused ones with column, value and reason. */
import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import { ROW_OUTCOMES } from '@/shared/contract';
import type { BiometryImport, ImportRow, RowOutcome } from '@/shared/contract';
import { Button } from '@/shared/client/components/button';
import { Row, Stack } from '@/shared/client/components/card';
import { RadioGroup } from '@/shared/client/components/choices';
import { Link } from '@/shared/client/components/link';
import { QueryView } from '@/shared/client/components/query-view';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { OUTCOME_WORDS } from './import-words';
import { importRowsQuery } from './use-imports';

const COLUMNS: Column<ImportRow>[] = [
  { key: 'row', title: 'Row', share: 0.4, isNumber: true, render: (row) => `row ${row.row}` },
  { key: 'patient', title: 'Patient', share: 1.2, render: (row) => <RowPatient row={row} /> },
  { key: 'record', title: 'Record', share: 0.7, render: (row) => row.recordNumber || '—' },
  { key: 'side', title: 'Side', share: 0.5, render: (row) => row.side || '—' },
  { key: 'what', title: 'What and why', share: 3, render: (row) => <RowWords row={row} /> },
];

export function ImportRows({ file }: { file: BiometryImport }) {
  const [outcome, setOutcome] = useState<RowOutcome>(file.counts.refused > 0 ? 'refused' : 'created');
  const [marks, setMarks] = useState<string[]>([]);
  const after = marks.at(-1) ?? '';
  const rows = useQuery(importRowsQuery(file.id, { outcome, after, status: file.status }));
  const isStored = file.status === 'stored';
  const options = ROW_OUTCOMES.map((value) => ({
    value,
    label: isStored ? OUTCOME_WORDS[value].was : OUTCOME_WORDS[value].will,
  }));
  return (
    <Stack>
      <RadioGroup
        label="Rows that are"
        options={options}
        value={outcome}
        onChange={(value) => {
          setOutcome(value);
          setMarks([]);
        }}
      />
      <QueryView query={rows}>
        {({ items, next }) => (
          <>
            {items.length === 0 ? <Text color="ink2">No such row in this file.</Text> : null}
            {items.length > 0 ? (
              <DataTable label="Rows" columns={COLUMNS} items={items} keyOf={(row) => String(row.row)} />
            ) : null}
            <Row>
              {marks.length > 0 ? (
                <Button label="Earlier rows" onPress={() => setMarks(marks.slice(0, -1))} />
              ) : null}
              {next ? <Button label="Further rows" onPress={() => setMarks([...marks, next])} /> : null}
            </Row>
          </>
        )}
      </QueryView>
    </Stack>
  );
}

function RowPatient({ row }: { row: ImportRow }) {
  if (!row.patientId) return <Text>{row.patientName || '—'}</Text>;
  return (
    <Link
      href={{ pathname: '/patients/[patientId]', params: { patientId: row.patientId } }}
      label={row.patientName}
    />
  );
}

function RowWords({ row }: { row: ImportRow }) {
  if (row.problems.length === 0) return <Text>{row.summary}</Text>;
  return (
    <Stack gap={2}>
      {row.problems.map((problem) => (
        <Text
          key={`${problem.column} ${problem.message}`}
        >{`${problem.column}${problem.value ? ` "${problem.value}"` : ''}: ${problem.message}`}</Text>
      ))}
    </Stack>
  );
}
