/** What storing this file does, in three tallies, and the decision. */
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { importSchema, paths } from '@/shared/contract';
import type { BiometryImport, RowOutcome } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { Link } from '@/shared/client/components/link';
import { Mark } from '@/shared/client/components/mark';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { formatCount } from '@/shared/client/lib/format';
import { SPACE } from '@/shared/client/theme/tokens';
import { OUTCOME_WORDS } from './import-words';
import { importQuery } from './use-imports';

export function ImportDecision({ file }: { file: BiometryImport }) {
  const keep = (next: BiometryImport) => {
    queryClient.setQueryData(importQuery(file.id).queryKey, next);
    for (const key of ['home', 'patients', 'eyes']) void queryClient.invalidateQueries({ queryKey: [key] });
  };
  const confirm = useMutation({
    mutationFn: () => call(paths.importConfirm(file.id), importSchema, { method: 'POST' }),
    onSuccess: keep,
  });
  const discard = useMutation({
    mutationFn: () => call(paths.importDiscard(file.id), importSchema, { method: 'POST' }),
    onSuccess: keep,
  });
  const problem = confirm.error ?? discard.error;
  const { created, newPatients } = file.counts;
  const isStored = file.status === 'stored';
  return (
    <Card tone={isStored ? 'fair' : 'sea'} title={isStored ? 'Stored' : 'What would happen'}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.xl }}>
        <Tally outcome="created" count={created} isStored={isStored} />
        <Tally outcome="already-there" count={file.counts.alreadyThere} isStored={isStored} />
        <Tally outcome="refused" count={file.counts.refused} isStored={isStored} />
      </View>
      {file.sameFileAs ? (
        <Text>The very same file was stored before: storing it again changes nothing.</Text>
      ) : null}
      {problem ? <ErrorPanel problem={asProblem(problem)} kept="Nothing was stored." /> : null}
      {isStored ? (
        <Link href="/patients" label="To the patients" kind="primary" />
      ) : (
        <Row>
          <Button
            label={`Store ${formatCount(created, 'measurement')}, ${formatCount(newPatients, 'new patient')}`}
            kind="primary"
            isBusy={confirm.isPending}
            isDisabled={created === 0}
            onPress={() => confirm.mutate()}
          />
          <Button label="Discard this file" onPress={() => discard.mutate()} isBusy={discard.isPending} />
        </Row>
      )}
    </Card>
  );
}

function Tally({ outcome, count, isStored }: { outcome: RowOutcome; count: number; isStored: boolean }) {
  const words = OUTCOME_WORDS[outcome];
  return (
    <View style={{ gap: SPACE.xs }}>
      <Text variant="display" isNumber>
        {count.toLocaleString('en-GB')}
      </Text>
      <Mark tone={words.tone} label={isStored ? words.was : words.will} />
    </View>
  );
}
