/** Settling a stop: names patient, side, and what it means. The reason stays for good. */
import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { flagSchema, formatPatientName, paths, settlementInputSchema } from '@/shared/contract';
import type { EyeDesk, Flag } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { queryClient } from '@/shared/client/api/query-client';
import { useUser } from '@/shared/client/api/session-store';
import { Button } from '@/shared/client/components/button';
import { Dialog } from '@/shared/client/components/dialog';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { formatDate } from '@/shared/client/lib/format';

export function SettleDialog({ desk, flag, onClose }: { desk: EyeDesk; flag: Flag; onClose: () => void }) {
  const user = useUser();
  const [reason, setReason] = useState('');
  const [messages, setMessages] = useState<string[]>([]);
  const measurementId = desk.measurements.find((measurement) => measurement.isOfRecord)?.id ?? null;
  const body = { ruleId: flag.ruleId, measurementId, reason };
  const settle = useMutation({
    mutationFn: () =>
      call(paths.eyeSettlements(desk.patient.id, desk.eye.side), flagSchema, { method: 'POST', body }),
    onSuccess: () => {
      for (const key of ['home', 'patients', 'eyes', 'plans'])
        void queryClient.invalidateQueries({ queryKey: [key] });
      onClose();
    },
  });
  const submit = () => {
    const parsed = settlementInputSchema.safeParse(body);
    setMessages(parsed.success ? [] : parsed.error.issues.map((issue) => issue.message));
    if (parsed.success) settle.mutate();
  };
  return (
    <Dialog
      title={`Settle a stop for the ${desk.eye.side} eye?`}
      isOpen
      onClose={onClose}
      actions={
        <Button
          label={`Settle for the ${desk.eye.side} eye`}
          kind="danger"
          isBusy={settle.isPending}
          onPress={submit}
        />
      }
    >
      <FormErrors messages={messages} />
      {settle.error ? <ErrorPanel problem={asProblem(settle.error)} kept="Nothing was settled." /> : null}
      <Text variant="heading">{`${formatPatientName(desk.patient)}, born ${formatDate(desk.patient.birthDate)}`}</Text>
      <Text>{flag.message}</Text>
      <Text color="ink2">{`You, ${user.displayName}, take it on yourself that this eye may be planned all the same. The stop stays visible with your name and reason, and counts for this measurement only.`}</Text>
      <TextField label="Reason" value={reason} onChange={setReason} isMultiline isRequired />
    </Dialog>
  );
}
