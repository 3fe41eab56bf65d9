/** The form of a lens model: what it is, its powers, its constants per formula and origin. */
import { useState } from 'react';
import { View } from 'react-native';
import {
  CONSTANT_ORIGINS,
  LENS_DESIGN_NAMES,
  LENS_DESIGNS,
  LENS_KIND_NAMES,
  LENS_KINDS,
} from '@/shared/contract';
import type { ConstantOrigin, LensInput } from '@/shared/contract';
import type { ApiProblem } from '@/shared/client/api/problem';
import { Button } from '@/shared/client/components/button';
import { Card, Row } from '@/shared/client/components/card';
import { Checkbox, RadioGroup } from '@/shared/client/components/choices';
import { DecimalField, TextField } from '@/shared/client/components/field';
import { FormErrors } from '@/shared/client/components/form-error-summary';
import { ErrorPanel } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { SPACE } from '@/shared/client/theme/tokens';
import { ConstantLine } from './constant-line';
import { readLensForm } from './lens-form-values';
import type { ConstantText, LensFormValues, RangeText } from './lens-form-values';

interface LensFormProps {
  initial: LensFormValues;
  isBusy: boolean;
  isReadOnly: boolean;
  problem: ApiProblem | undefined;
  onSave: (input: LensInput) => void;
}

const KINDS = LENS_KINDS.map((value) => ({ value, label: LENS_KIND_NAMES[value] }));
const DESIGNS = LENS_DESIGNS.map((value) => ({ value, label: LENS_DESIGN_NAMES[value] }));
const ORIGIN_TITLES = {
  optical: 'Constants for optical axial length',
  ultrasound: 'Constants for ultrasound axial length',
} as const;

export function LensForm({ initial, isBusy, isReadOnly, problem, onSave }: LensFormProps) {
  const [form, setForm] = useState(initial);
  const [messages, setMessages] = useState<string[]>([]);
  const change = (part: Partial<LensFormValues>) => setForm((before) => ({ ...before, ...part }));
  const submit = () => {
    const reading = readLensForm(form);
    setMessages('messages' in reading ? reading.messages : []);
    if ('input' in reading) onSave(reading.input);
  };
  return (
    <View style={{ gap: SPACE.l }}>
      <FormErrors messages={messages} />
      {problem ? <ErrorPanel problem={problem} kept="What you typed is still here." /> : null}
      <Card title="Model">
        <TextField
          label="Name"
          value={form.name}
          onChange={(name) => change({ name })}
          isDisabled={isReadOnly}
          isRequired
        />
        <RadioGroup
          label="Kind"
          options={KINDS}
          value={form.kind}
          onChange={(kind) => change({ kind })}
          isDisabled={isReadOnly}
        />
        <RadioGroup
          label="Design"
          options={DESIGNS}
          value={form.design}
          onChange={(design) => change({ design })}
          isDisabled={isReadOnly}
        />
        <TextField
          label="Remarks"
          value={form.remarks}
          onChange={(remarks) => change({ remarks })}
          isDisabled={isReadOnly}
        />
        <Checkbox
          label="Retired"
          hint="Stays on old plans, is not offered for new ones"
          isChecked={form.isRetired}
          onChange={(isRetired) => change({ isRetired })}
          isDisabled={isReadOnly}
        />
      </Card>
      <Card title="Powers">
        {form.ranges.map((range, index) => (
          <RangeLine
            key={index}
            number={index + 1}
            range={range}
            isReadOnly={isReadOnly}
            onChange={(part) =>
              change({ ranges: form.ranges.map((other, i) => (i === index ? { ...other, ...part } : other)) })
            }
          />
        ))}
        {isReadOnly ? null : (
          <Row>
            <Button
              label="Add a range"
              onPress={() => change({ ranges: [...form.ranges, { fromD: '', toD: '', stepD: '1' }] })}
            />
            {form.ranges.length > 1 ? (
              <Button
                label="Remove the last range"
                onPress={() => change({ ranges: form.ranges.slice(0, -1) })}
              />
            ) : null}
          </Row>
        )}
        <DecimalField
          label="Cylinder steps at the lens plane"
          unit="D"
          hint="For a toric model: positive values with spaces between, rising. Empty: not toric."
          value={form.cylinders}
          onChange={(cylinders) => change({ cylinders })}
          isDisabled={isReadOnly}
        />
      </Card>
      {CONSTANT_ORIGINS.map((origin) => (
        <ConstantsCard
          key={origin}
          origin={origin}
          lines={form.constants}
          isReadOnly={isReadOnly}
          onChange={(constants) => change({ constants })}
        />
      ))}
      {isReadOnly ? null : <Button label="Save the model" kind="primary" isBusy={isBusy} onPress={submit} />}
    </View>
  );
}

interface ConstantsCardProps {
  origin: ConstantOrigin;
  lines: readonly ConstantText[];
  isReadOnly: boolean;
  onChange: (lines: ConstantText[]) => void;
}

function ConstantsCard({ origin, lines, isReadOnly, onChange }: ConstantsCardProps) {
  return (
    <Card title={ORIGIN_TITLES[origin]}>
      <Text color="ink2">
        Optical and ultrasound constants are never mixed. A formula without constants here is silent for such
        eyes.
      </Text>
      {lines.map((line, index) =>
        line.origin === origin ? (
          <ConstantLine
            key={line.formula}
            line={line}
            isReadOnly={isReadOnly}
            onChange={(part) =>
              onChange(lines.map((other, i) => (i === index ? { ...other, ...part } : other)))
            }
          />
        ) : null,
      )}
    </Card>
  );
}

interface RangeLineProps {
  number: number;
  range: RangeText;
  isReadOnly: boolean;
  onChange: (part: Partial<RangeText>) => void;
}

function RangeLine({ number, range, isReadOnly, onChange }: RangeLineProps) {
  return (
    <View
      role="group"
      aria-label={`Range ${number}`}
      style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.m }}
    >
      <View style={{ flex: 1, minWidth: 90 }}>
        <DecimalField
          label="From"
          unit="D"
          value={range.fromD}
          onChange={(fromD) => onChange({ fromD })}
          isDisabled={isReadOnly}
          isRequired
        />
      </View>
      <View style={{ flex: 1, minWidth: 90 }}>
        <DecimalField
          label="To"
          unit="D"
          value={range.toD}
          onChange={(toD) => onChange({ toD })}
          isDisabled={isReadOnly}
          isRequired
        />
      </View>
      <View style={{ flex: 1, minWidth: 90 }}>
        <DecimalField
          label="Step"
          unit="D"
          value={range.stepD}
          onChange={(stepD) => onChange({ stepD })}
          isDisabled={isReadOnly}
          isRequired
        />
      </View>
    </View>
  );
}
