/** Catalogue from a CSV: checked first, stored after a second look. */
import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { LENS_COLUMNS, lensImportResultSchema, paths } from '@/shared/contract';
import type { LensImportResult } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { FileDrop } from '@/shared/client/components/file-drop';
import { Link } from '@/shared/client/components/link';
import { Screen } from '@/shared/client/components/screen';
import { ErrorPanel, SuccessNote } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { downloadFile } from '@/shared/client/lib/download';
import { LensImportResultView } from './lens-import-result';

function send(file: File, isDryRun: boolean): Promise<LensImportResult> {
  const form = new FormData();
  form.append('file', file);
  return call(`${paths.lensImport()}?dryRun=${isDryRun ? 1 : 0}`, lensImportResultSchema, {
    method: 'POST',
    form,
  });
}

export function LensImportScreen() {
  const [file, setFile] = useState<File>();
  const check = useMutation({ mutationFn: (chosen: File) => send(chosen, true) });
  const store = useMutation({
    mutationFn: (chosen: File) => send(chosen, false),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['lenses'] }),
  });
  const problem = store.error ?? check.error;
  const onFile = (chosen: File) => {
    setFile(chosen);
    store.reset();
    check.mutate(chosen);
  };
  const result = store.data ?? check.data;
  return (
    <Screen
      title="Import lens models"
      back="/lenses"
      lead="One line per model and origin of constants. Nothing is stored before you confirm."
    >
      <FileDrop
        label="Drop a catalogue file here"
        hint="CSV with the columns of the template"
        onFile={onFile}
        isBusy={check.isPending}
      />
      {problem ? <ErrorPanel problem={asProblem(problem)} kept="Nothing was stored." /> : null}
      {store.isSuccess ? <SuccessNote text="Stored" /> : null}
      {result ? <LensImportResultView result={result} /> : null}
      {check.isSuccess && !store.isSuccess && file ? (
        <Row>
          <Button
            label="Store these models"
            kind="primary"
            isBusy={store.isPending}
            onPress={() => store.mutate(file)}
          />
          <Button label="Leave it" onPress={() => check.reset()} />
        </Row>
      ) : null}
      {store.isSuccess ? <Link href="/lenses" label="To the catalogue" /> : null}
      <Card
        title="Columns"
        aside={
          <Button label="Download the template" onPress={() => void downloadFile(paths.lensTemplate())} />
        }
      >
        <Text isNumber style={{ overflowWrap: 'anywhere' } as object}>
          {LENS_COLUMNS.join(', ')}
        </Text>
        <Text color="ink2">
          Ranges of powers as from:to:step with spaces between, for example 5:10:1 10:30:0.5. Cylinder steps
          with spaces between. A line with constants_origin optical and another with ultrasound belong to one
          model when the name is the same.
        </Text>
      </Card>
    </Screen>
  );
}
