/** One file: how it was read, what it would do row by row, and the decision to store it. */
import { useLocalSearchParams } from 'expo-router';
import { useQuery } from '@tanstack/react-query';
import { paths } from '@/shared/contract';
import type { BiometryImport } from '@/shared/contract';
import { Button } from '@/shared/client/components/button';
import { Card } from '@/shared/client/components/card';
import { Mark } from '@/shared/client/components/mark';
import { QueryView } from '@/shared/client/components/query-view';
import { Screen } from '@/shared/client/components/screen';
import { ProgressBar } from '@/shared/client/components/states';
import { Facts } from '@/shared/client/components/table';
import { Text } from '@/shared/client/components/text';
import { downloadFile } from '@/shared/client/lib/download';
import { formatBytes, formatInstant } from '@/shared/client/lib/format';
import { ImportDecision } from './import-decision';
import { ImportRows } from './import-rows';
import { STATUS_WORDS } from './import-words';
import { importQuery, isRunning } from './use-imports';

export function ImportScreen() {
  const { importId } = useLocalSearchParams<{ importId: string }>();
  const query = useQuery(importQuery(importId));
  return (
    <Screen
      title={query.data?.fileName ?? 'Import'}
      lead={query.data ? STATUS_WORDS[query.data.status] : undefined}
      back="/imports"
      width="full"
    >
      <QueryView query={query}>{(loaded) => <ImportBody file={loaded} />}</QueryView>
    </Screen>
  );
}

function ImportBody({ file }: { file: BiometryImport }) {
  const hasRows = file.status === 'ready' || file.status === 'stored';
  return (
    <>
      {isRunning(file) ? (
        <ProgressBar label={file.status === 'checking' ? 'Rows checked' : 'Rows stored'} {...file.progress} />
      ) : null}
      {file.problems.length > 0 ? <WholeFileProblems file={file} /> : null}
      {hasRows ? <ImportDecision file={file} /> : null}
      {hasRows ? <ImportRows file={file} /> : null}
      <Card
        title="The file"
        aside={
          <Button
            label="Download the original file"
            onPress={() => void downloadFile(paths.importFile(file.id))}
          />
        }
      >
        <Facts
          items={[
            { label: 'Read as', value: file.readAs || '—' },
            { label: 'Size', value: formatBytes(file.sizeBytes) },
            { label: 'Uploaded', value: `${formatInstant(file.uploadedAt)}, ${file.uploadedBy}` },
            {
              label: 'Stored',
              value: file.storedAt ? `${formatInstant(file.storedAt)}, ${file.storedBy ?? '—'}` : '—',
            },
          ]}
        />
        <Text variant="small" color="ink2">
          Kept byte for byte. Fingerprint (SHA-256):
        </Text>
        <Text variant="small" isNumber style={{ overflowWrap: 'anywhere' } as object}>
          {file.sha256}
        </Text>
      </Card>
    </>
  );
}

function WholeFileProblems({ file }: { file: BiometryImport }) {
  return (
    <Card tone="stop" label="Refused as a whole">
      <Mark tone="stop" label="This file cannot be read: nothing of it is stored" />
      {file.problems.map((problem) => (
        <Text key={`${problem.path} ${problem.message}`}>{`▪ ${problem.message}`}</Text>
      ))}
      <Text color="ink2">Correct the file and upload it again.</Text>
    </Card>
  );
}
