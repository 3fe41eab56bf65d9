/** Registering and correcting a patient. What was typed survives a reload. */
import { useState } from 'react';
import { Controller, useForm } from 'react-hook-form';
import { zodResolver } from '@hookform/resolvers/zod';
import { patientInputSchema, SEXES } from '@/shared/contract';
import type { PatientInput } from '@/shared/contract';
import type { ApiProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { RadioGroup } from '@/shared/client/components/choices';
import { DateField } from '@/shared/client/components/date-field';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { useFormDraft } from '@/shared/client/lib/use-form-draft';

interface PatientFormProps {
  /** Names the draft. */
  name: string;
  initial: PatientInput;
  saveLabel: string;
  isBusy: boolean;
  problem: ApiProblem | undefined;
  onSave: (input: PatientInput, forgetDraft: () => void) => void;
}

const SEX_OPTIONS = SEXES.map((value) => ({ value, label: value }));
const TEXT_FIELDS = [
  { name: 'recordNumber', label: 'Record number' },
  { name: 'familyName', label: 'Family name' },
  { name: 'givenName', label: 'Given name' },
] as const;

export function PatientForm({ name, initial, saveLabel, isBusy, problem, onSave }: PatientFormProps) {
  const form = useForm<PatientInput, unknown, PatientInput>({
    resolver: zodResolver(patientInputSchema),
    defaultValues: initial,
  });
  const draft = useFormDraft(form, name);
  const [messages, setMessages] = useState<string[]>([]);
  const submit = form.handleSubmit(
    (input) => {
      setMessages([]);
      onSave(input, draft.remove);
    },
    (errors) => setMessages(Object.values(errors).map((error) => error.message ?? 'Something is missing')),
  );
  const errorOf = (field: keyof PatientInput) =>
    form.formState.errors[field]?.message ?? problem?.messageFor(field);
  return (
    <>
      <FormErrors messages={messages} />
      {problem ? <ErrorPanel problem={problem} kept="What you typed is still here." /> : null}
      {draft.isRestored ? (
        <Row>
          <Text color="ink2">This is what you typed earlier.</Text>
          <Button label="Start anew" kind="plain" onPress={draft.startAnew} />
        </Row>
      ) : null}
      <Card label="Patient">
        {TEXT_FIELDS.map((field) => (
          <Controller
            key={field.name}
            control={form.control}
            name={field.name}
            render={({ field: control }) => (
              <TextField
                label={field.label}
                value={control.value}
                onChange={control.onChange}
                onBlur={control.onBlur}
                error={errorOf(field.name)}
                ref={control.ref}
                isRequired
              />
            )}
          />
        ))}
        <Controller
          control={form.control}
          name="birthDate"
          render={({ field }) => (
            <DateField
              label="Birth date"
              value={field.value}
              onChange={field.onChange}
              onBlur={field.onBlur}
              error={errorOf('birthDate')}
              isRequired
            />
          )}
        />
        <Controller
          control={form.control}
          name="sex"
          render={({ field }) => (
            <RadioGroup
              label="Sex"
              options={SEX_OPTIONS}
              value={field.value}
              onChange={field.onChange}
              error={errorOf('sex')}
            />
          )}
        />
        <Button label={saveLabel} kind="primary" isBusy={isBusy} onPress={() => void submit()} />
      </Card>
    </>
  );
}
