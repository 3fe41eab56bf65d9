/** What calculations need to know of the eye's past. Unanswered is shown as such, never as "no". */
import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { eyeHistorySchema, eyeSchema, hasPermission, paths } from '@/shared/contract';
import type { EyeDesk, EyeHistory } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { RadioGroup } from '@/shared/client/components/choices';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { Mark } from '@/shared/client/components/mark';
import { ErrorPanel } from '@/shared/client/components/states';
import { Facts } from '@/shared/client/components/table';
import {
  KIND_OPTIONS,
  LENS_OPTIONS,
  SURGERY_OPTIONS,
  UNANSWERED,
  VITREOUS_OPTIONS,
  wordFor,
} from './history-options';

export function HistoryCard({ desk }: { desk: EyeDesk }) {
  const { roles } = useUser();
  const [isEditing, setIsEditing] = useState(false);
  const canWrite = hasPermission(roles, 'patient.write');
  return (
    <Card
      title="History of this eye"
      aside={
        canWrite && !isEditing ? (
          <Button label="Answer or correct" onPress={() => setIsEditing(true)} />
        ) : undefined
      }
    >
      {isEditing ? (
        <HistoryForm desk={desk} onDone={() => setIsEditing(false)} />
      ) : (
        <HistoryFacts history={desk.eye.history} />
      )}
    </Card>
  );
}

function HistoryFacts({ history }: { history: EyeHistory }) {
  const shown = (word: string) => (word === UNANSWERED ? <Mark tone="stop" label={UNANSWERED} /> : word);
  const kind = history.cornealSurgeryKind
    ? `, ${wordFor(KIND_OPTIONS, history.cornealSurgeryKind).toLowerCase()}`
    : '';
  return (
    <Facts
      items={[
        { label: 'Corneal surgery', value: shown(wordFor(SURGERY_OPTIONS, history.cornealSurgery) + kind) },
        { label: 'Lens', value: shown(wordFor(LENS_OPTIONS, history.lensStatus)) },
        { label: 'Filling of the eye', value: shown(wordFor(VITREOUS_OPTIONS, history.vitreousStatus)) },
        { label: 'Remarks', value: history.remarks || '—' },
      ]}
    />
  );
}

function HistoryForm({ desk, onDone }: { desk: EyeDesk; onDone: () => void }) {
  const [history, setHistory] = useState(desk.eye.history);
  const [messages, setMessages] = useState<string[]>([]);
  const change = (part: Partial<EyeHistory>) => setHistory((before) => ({ ...before, ...part }));
  const save = useMutation({
    mutationFn: () =>
      call(paths.eyeHistory(desk.patient.id, desk.eye.side), eyeSchema, {
        method: 'PUT',
        body: history,
        version: desk.eye.version,
      }),
    onSuccess: () => {
      for (const key of ['home', 'patients', 'eyes', 'plans'])
        void queryClient.invalidateQueries({ queryKey: [key] });
      onDone();
    },
  });
  const submit = () => {
    const parsed = eyeHistorySchema.safeParse(history);
    setMessages(parsed.success ? [] : parsed.error.issues.map((issue) => issue.message));
    if (parsed.success) save.mutate();
  };
  return (
    <>
      <FormErrors messages={messages} />
      {save.error ? <ErrorPanel problem={asProblem(save.error)} kept="Your answers are still here." /> : null}
      <RadioGroup
        label="Did this cornea have surgery?"
        hint="Plain formulas do not hold after it."
        options={SURGERY_OPTIONS}
        value={history.cornealSurgery}
        onChange={(cornealSurgery) =>
          change({ cornealSurgery, ...(cornealSurgery === 'yes' ? {} : { cornealSurgeryKind: null }) })
        }
      />
      {history.cornealSurgery === 'yes' ? (
        <RadioGroup
          label="Which?"
          options={KIND_OPTIONS}
          value={history.cornealSurgeryKind}
          onChange={(cornealSurgeryKind) => change({ cornealSurgeryKind })}
        />
      ) : null}
      <RadioGroup
        label="Lens"
        options={LENS_OPTIONS}
        value={history.lensStatus}
        onChange={(lensStatus) => change({ lensStatus })}
      />
      <RadioGroup
        label="Filling of the eye"
        options={VITREOUS_OPTIONS}
        value={history.vitreousStatus}
        onChange={(vitreousStatus) => change({ vitreousStatus })}
      />
      <TextField
        label="Remarks"
        value={history.remarks}
        onChange={(remarks) => change({ remarks })}
        isMultiline
      />
      <Row>
        <Button label="Save the history" kind="primary" isBusy={save.isPending} onPress={submit} />
        <Button label="Leave as it was" onPress={onDone} />
      </Row>
    </>
  );
}
