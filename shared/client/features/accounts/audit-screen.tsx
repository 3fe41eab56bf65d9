/** The audit trail: who did or saw what, when. Newest first, append-only. */
import { useState } from 'react';
import { useQuery } from '@tanstack/react-query';
import type { AuditEntry } from '@/shared/contract';
import { Button } from '@/shared/client/components/button';
import { Row } from '@/shared/client/components/card';
import { QueryView } from '@/shared/client/components/query-view';
import { Select } from '@/shared/client/components/select';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { formatInstant } from '@/shared/client/lib/format';
import { auditQuery } from './use-accounts';

const COLUMNS: Column<AuditEntry>[] = [
  { key: 'at', title: 'When', render: (entry) => formatInstant(entry.at) },
  { key: 'who', title: 'Who', render: (entry) => entry.actorName },
  { key: 'what', title: 'What', render: (entry) => entry.action },
  { key: 'detail', title: 'Detail', share: 2, render: (entry) => detailOf(entry) },
];
const NOUNS = ['', 'patient', 'eye', 'measurement', 'import', 'lens', 'plan', 'account', 'session'].map(
  (noun) => ({
    value: noun,
    label: noun || 'everything',
  }),
);

export function AuditScreen() {
  const [noun, setNoun] = useState('');
  const [cursors, setCursors] = useState<string[]>([]);
  const after = cursors.at(-1);
  const filter = new URLSearchParams({ ...(noun ? { noun } : {}), ...(after ? { after } : {}) }).toString();
  const audit = useQuery(auditQuery(filter));
  const next = audit.data?.next;
  return (
    <Screen
      title="Audit trail"
      lead="Every change and every view of a record. Entries cannot be altered or removed."
      width="full"
    >
      <Select
        label="About"
        options={NOUNS}
        value={noun}
        onChange={(value) => {
          setNoun(value);
          setCursors([]);
        }}
      />
      <QueryView query={audit} lines={8}>
        {({ items }) =>
          items.length === 0 ? (
            <EmptyState title="Nothing here" hint="Entries appear as people work." />
          ) : (
            <DataTable
              label="Audit entries"
              columns={COLUMNS}
              items={items}
              keyOf={(entry) => String(entry.id)}
            />
          )
        }
      </QueryView>
      <Row>
        {cursors.length > 0 ? (
          <Button label="Newer" onPress={() => setCursors(cursors.slice(0, -1))} />
        ) : null}
        {next ? <Button label="Older" onPress={() => setCursors([...cursors, next])} /> : null}
      </Row>
    </Screen>
  );
}

function detailOf(entry: AuditEntry): string {
  const detail = Object.entries(entry.detail).map(
    ([name, value]) => `${name}: ${typeof value === 'string' ? value : JSON.stringify(value)}`,
  );
  return detail.join(', ').slice(0, 300) || '—';
}
