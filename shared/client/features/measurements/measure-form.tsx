/** The form of a measurement: text as typed, read by the one reading that files use too. */
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { useMutation } from '@tanstack/react-query';
import { localDateOf, measurementSchema, paths, readMeasurement } from '@/shared/contract';
import type { EyeDesk, MeasurementTextField } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { useRequestKeys } from '@/shared/client/api/use-request-key';
import { Button } from '@/shared/client/components/button';
import { Row } from '@/shared/client/components/card';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { useFormDraft } from '@/shared/client/lib/use-form-draft';
import { EMPTY_MEASURE_TEXT } from './measure-text';
import type { MeasureText } from './measure-text';
import { MeasureFields } from './measure-fields';
import { SupersedeCard } from './supersede-card';

export function MeasureForm({ desk, onDone }: { desk: EyeDesk; onDone: () => void }) {
  const { patient, eye } = desk;
  const form = useForm<MeasureText>({
    defaultValues: {
      ...EMPTY_MEASURE_TEXT,
      method: 'optical',
      keratometricIndex: '1.3375',
      acdFrom: 'epithelium',
    },
  });
  const draft = useFormDraft(form, `measurement/${patient.id}/${eye.side}`);
  const [problems, setProblems] = useState<{ field: string; message: string }[]>([]);
  const keys = useRequestKeys();
  const save = useMutation({
    mutationFn: (body: unknown) =>
      call(paths.eyeMeasurements(patient.id, eye.side), measurementSchema, {
        method: 'POST',
        body,
        idempotencyKey: keys.keyFor(body),
      }),
    onSuccess: () => {
      draft.remove();
      for (const key of ['home', 'patients', 'eyes', 'plans'])
        void queryClient.invalidateQueries({ queryKey: [key] });
      onDone();
    },
  });
  const submit = form.handleSubmit(({ reason, supersedesId, ...typed }) => {
    const text = relevant(typed);
    const reading = readMeasurement(text, { today: localDateOf(new Date()), birthDate: patient.birthDate });
    const found = 'problems' in reading ? [...reading.problems] : [];
    const unexplained =
      supersedesId !== '' && reason.trim().length < 5
        ? [{ field: 'reason', message: 'Say in a few words why the other is superseded' }]
        : [];
    setProblems([...found, ...unexplained]);
    if (found.length + unexplained.length === 0)
      save.mutate({ text, supersedesId: supersedesId || null, reason });
  });
  return (
    <>
      <FormErrors messages={problems.map(({ message }) => message)} />
      {save.error ? (
        <ErrorPanel problem={asProblem(save.error)} kept="What you typed is still here." />
      ) : null}
      {draft.isRestored ? (
        <Row>
          <Text color="ink2">This is what you typed earlier.</Text>
          <Button label="Start anew" kind="plain" onPress={draft.startAnew} />
        </Row>
      ) : null}
      <MeasureFields form={form} problems={problems} />
      <SupersedeCard
        form={form}
        desk={desk}
        problem={problems.find(({ field }) => field === 'reason')?.message}
      />
      <Button
        label={`Store for the ${eye.side} eye`}
        kind="primary"
        isBusy={save.isPending}
        onPress={() => void submit()}
      />
    </>
  );
}

/** An index belongs to powers, a reference to a depth: without these they are not part of the measurement. */
function relevant(text: Record<MeasurementTextField, string>): Record<MeasurementTextField, string> {
  const hasPower = text.flatKD.trim() !== '' || text.steepKD.trim() !== '';
  return {
    ...text,
    keratometricIndex: hasPower ? text.keratometricIndex : '',
    acdFrom: text.acdMm.trim() === '' ? '' : text.acdFrom,
  };
}
