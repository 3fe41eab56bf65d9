/** Biometry files: drop one in, see the earlier ones, read how the template is made. */
import { router, useLocalSearchParams } from 'expo-router';
import { useMutation, useQuery } from '@tanstack/react-query';
import { IMPORT_MAX_BYTES, IMPORT_MAX_ROWS, importSchema, paths } from '@/shared/contract';
import type { BiometryImport } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { upload } from '@/shared/client/api/upload';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { FileDrop } from '@/shared/client/components/file-drop';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { ErrorPanel } from '@/shared/client/components/states';
import { DataTable } from '@/shared/client/components/table';
import type { Column } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { practiceQuery } from '@/shared/client/features/auth/use-practice';
import { downloadFile } from '@/shared/client/lib/download';
import { formatBytes, formatInstant } from '@/shared/client/lib/format';
import { STATUS_WORDS } from './import-words';
import { TemplateTable } from './template-table';
import { importsQuery } from './use-imports';

const COLUMNS: Column<BiometryImport>[] = [
  { key: 'file', title: 'File', share: 1.6, render: (one) => one.fileName },
  { key: 'status', title: 'State', render: (one) => STATUS_WORDS[one.status] },
  {
    key: 'created',
    title: 'Created',
    share: 0.6,
    isNumber: true,
    render: (one) => String(one.counts.created),
  },
  {
    key: 'there',
    title: 'Already there',
    share: 0.8,
    isNumber: true,
    render: (one) => String(one.counts.alreadyThere),
  },
  {
    key: 'refused',
    title: 'Refused',
    share: 0.6,
    isNumber: true,
    render: (one) => String(one.counts.refused),
  },
  {
    key: 'who',
    title: 'Uploaded',
    share: 1.4,
    render: (one) => `${formatInstant(one.uploadedAt)}, ${one.uploadedBy}`,
  },
];

export function ImportsScreen() {
  const { after = '' } = useLocalSearchParams<{ after?: string }>();
  const imports = useQuery(importsQuery(after));
  const { data: practice } = useQuery(practiceQuery());
  const send = useMutation({
    mutationFn: (file: File) => upload(paths.imports(), importSchema, { file }),
    onSuccess: (uploaded) => {
      void queryClient.invalidateQueries({ queryKey: ['imports', 'list'] });
      router.push({ pathname: '/imports/[importId]', params: { importId: uploaded.id } });
    },
  });
  return (
    <Screen
      title="Imports"
      lead="Nothing is stored before you have seen, row by row, what would happen."
      width="full"
    >
      {send.error ? <ErrorPanel problem={asProblem(send.error)} kept="Nothing was stored." /> : null}
      <FileDrop
        label="Drop a biometry file here"
        hint={`CSV with the columns of the template, up to ${formatBytes(IMPORT_MAX_BYTES)} and ${IMPORT_MAX_ROWS.toLocaleString('en-GB')} rows. Comma, semicolon or tab; decimal point or comma.`}
        isBusy={send.isPending}
        onFile={(file) => send.mutate(file)}
      />
      <Row>
        <Button
          label="Download the empty template"
          onPress={() => void downloadFile(paths.importTemplate())}
        />
        {practice?.isDemo ? (
          <Button label="Download the demo file" onPress={() => void downloadFile(paths.importDemoFile())} />
        ) : null}
      </Row>
      <QueryView query={imports}>
        {({ items, next }) => (
          <>
            <Text variant="heading" level={2}>
              Files so far
            </Text>
            {items.length === 0 ? <Text color="ink2">No file was uploaded yet.</Text> : null}
            {items.length > 0 ? (
              <DataTable
                label="Files so far"
                columns={COLUMNS}
                items={items}
                keyOf={(one) => one.id}
                linkOf={(one) => ({
                  href: { pathname: '/imports/[importId]', params: { importId: one.id } },
                  label: one.fileName,
                })}
              />
            ) : null}
            {next ? <Button label="Older files" onPress={() => router.setParams({ after: next })} /> : null}
          </>
        )}
      </QueryView>
      <Card title="The template">
        <Text color="ink2">
          All columns must be there, in any order. Radii count when radii and powers agree; they are refused
          when they differ by more than 0.25 D.
        </Text>
        <TemplateTable />
      </Card>
    </Screen>
  );
}
