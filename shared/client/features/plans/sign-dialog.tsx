/**
 * Signing: names patient, side, lens, power and consequence; the side is chosen anew, each weigh flag is
 * ticked as read, the password is typed again. Nothing is preset.
 */
import { useState } from 'react';
import { View } from 'react-native';
import { SIDES } from '@/shared/contract';
import type { PlanDesk, Side } from '@/shared/contract';
import { asProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Checkbox, RadioGroup } from '@/shared/client/components/choices';
import { Dialog } from '@/shared/client/components/dialog';
import { TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { formatDate, sideWords } from '@/shared/client/lib/format';
import { SPACE } from '@/shared/client/theme/tokens';
import { ChosenLens } from './chosen-lens';
import { useSignPlan } from './use-plans';

export function SignDialog({ desk, onClose }: { desk: PlanDesk; onClose: () => void }) {
  const [side, setSide] = useState<Side | null>(null);
  const [read, setRead] = useState<string[]>([]);
  const [password, setPassword] = useState('');
  const [messages, setMessages] = useState<string[]>([]);
  const sign = useSignPlan(desk);
  const weighs = desk.calculation.flags.filter((flag) => flag.severity === 'weigh');
  const { patient, plan } = desk;
  const submit = () => {
    const missing = [
      ...(side === null ? ['Choose the side that this plan is for'] : []),
      ...(side !== null && side !== plan.side
        ? [`This plan is for the ${plan.side} eye, not the ${side}`]
        : []),
      ...(read.length < weighs.length ? ['Tick each point to weigh as read'] : []),
      ...(password === '' ? ['Type your password'] : []),
    ];
    setMessages(missing);
    if (missing.length === 0 && side)
      sign.mutate({ password, confirmedSide: side, acknowledgedRuleIds: read }, { onSuccess: onClose });
  };
  return (
    <Dialog
      title={`Sign for the ${plan.side} eye?`}
      isOpen
      onClose={onClose}
      cancelLabel="Not yet"
      actions={
        <Button
          label={`Sign for the ${plan.side} eye`}
          kind="primary"
          isBusy={sign.isPending}
          onPress={submit}
        />
      }
    >
      <FormErrors messages={messages} />
      {sign.error ? <ErrorPanel problem={asProblem(sign.error)} kept="Nothing was signed." /> : null}
      <View style={{ gap: SPACE.xs }}>
        <Text variant="heading">{`${patient.familyName}, ${patient.givenName}`}</Text>
        <Text>{`born ${formatDate(patient.birthDate)}, record ${patient.recordNumber}`}</Text>
      </View>
      <ChosenLens desk={desk} models={desk.calculation.models} />
      <Text color="ink2">
        Your signature freezes the measurement, the constants, the formula version, the results and the flags.
        It replaces an earlier signed plan of this eye. A later change of any input marks this plan out of
        date.
      </Text>
      <RadioGroup
        label="This plan is for"
        options={SIDES.map((value) => ({ value, label: sideWords(value) }))}
        value={side}
        onChange={setSide}
      />
      {weighs.length > 0 ? <Text variant="strong">I have weighed:</Text> : null}
      {weighs.map((flag) => (
        <Checkbox
          key={flag.ruleId}
          label={flag.message}
          isChecked={read.includes(flag.ruleId)}
          onChange={(isChecked) =>
            setRead(isChecked ? [...read, flag.ruleId] : read.filter((other) => other !== flag.ruleId))
          }
        />
      ))}
      <TextField
        label="Your password"
        type="password"
        autoComplete="current-password"
        value={password}
        onChange={setPassword}
        onSubmit={submit}
        isRequired
      />
    </Dialog>
  );
}
