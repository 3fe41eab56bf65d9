/** The fields of a measurement, in the order of a printout, with units beside their labels. */
import { Controller } from 'react-hook-form';
import type { UseFormReturn } from 'react-hook-form';
import { View } from 'react-native';
import {
  ACD_FROM,
  ACD_FROM_NAMES,
  MEASUREMENT_FIELDS,
  METHOD_NAMES,
  METHODS,
  parseDecimal,
} from '@/shared/contract';
import type { MeasurementTextField } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { RadioGroup } from '@/shared/client/components/choices';
import { DateField } from '@/shared/client/components/date-field';
import { DecimalField, TextField } from '@/shared/client/components/field';
import { Text } from '@/shared/client/components/text';
import { formatKeratometry, formatMm } from '@/shared/client/lib/format';
import { SPACE } from '@/shared/client/theme/tokens';
import type { MeasureText } from './measure-text';

interface MeasureFieldsProps {
  form: UseFormReturn<MeasureText>;
  problems: readonly { field: string; message: string }[];
}

const CORNEA: MeasurementTextField[] = [
  'flatKD',
  'flatRadiusMm',
  'flatAxisDeg',
  'steepKD',
  'steepRadiusMm',
  'steepAxisDeg',
  'keratometricIndex',
];
const REST: MeasurementTextField[] = ['lensThicknessMm', 'cornealThicknessUm', 'whiteToWhiteMm', 'pupilMm'];
const METHOD_OPTIONS = METHODS.map((value) => ({ value, label: METHOD_NAMES[value] }));
const ACD_OPTIONS = ACD_FROM.map((value) => ({ value, label: ACD_FROM_NAMES[value] }));

export function MeasureFields({ form, problems }: MeasureFieldsProps) {
  const errorOf = (field: string) => problems.find((problem) => problem.field === field)?.message;
  const number = (field: MeasurementTextField, isRequired = false) => (
    <NumberField key={field} form={form} field={field} error={errorOf(field)} isRequired={isRequired} />
  );
  const { control } = form;
  return (
    <>
      <Card title="When and how">
        <Controller
          control={control}
          name="measuredAt"
          render={({ field }) => (
            <DateField
              label="Measured on"
              value={field.value}
              onChange={field.onChange}
              error={errorOf('measuredAt')}
              isRequired
            />
          )}
        />
        <Controller
          control={control}
          name="method"
          render={({ field }) => (
            <RadioGroup
              label="Method"
              options={METHOD_OPTIONS}
              value={METHODS.find((method) => method === field.value) ?? null}
              onChange={field.onChange}
              error={errorOf('method')}
            />
          )}
        />
        <Controller
          control={control}
          name="device"
          render={({ field }) => (
            <TextField
              label="Device"
              value={field.value}
              onChange={field.onChange}
              error={errorOf('device')}
            />
          )}
        />
        <Controller
          control={control}
          name="operator"
          render={({ field }) => (
            <TextField
              label="Operator"
              value={field.value}
              onChange={field.onChange}
              error={errorOf('operator')}
            />
          )}
        />
      </Card>
      <Card title="Length and depth">
        {number('axialLengthMm', true)}
        {number('axialLengthSdMm')}
        {number('acdMm')}
        <Controller
          control={control}
          name="acdFrom"
          render={({ field }) => (
            <RadioGroup
              label="Depth measured from the"
              options={ACD_OPTIONS}
              value={ACD_FROM.find((from) => from === field.value) ?? null}
              onChange={field.onChange}
              error={errorOf('acdFrom')}
            />
          )}
        />
        {REST.map((field) => number(field))}
      </Card>
      <Card title="Cornea">
        <Text color="ink2">Dioptres with their index, or radii in millimetres, or both if they agree.</Text>
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.m }}>
          {CORNEA.map((field) => (
            <View key={field} style={{ flexGrow: 1, flexBasis: 180 }}>
              {number(field)}
            </View>
          ))}
        </View>
        <Conversion form={form} />
      </Card>
      <Card title="Remarks">
        <Controller
          control={control}
          name="remarks"
          render={({ field }) => (
            <TextField
              label="Remarks"
              value={field.value}
              onChange={field.onChange}
              error={errorOf('remarks')}
              isMultiline
            />
          )}
        />
      </Card>
    </>
  );
}

interface NumberFieldProps {
  form: UseFormReturn<MeasureText>;
  field: MeasurementTextField;
  error: string | undefined;
  isRequired: boolean;
}

function NumberField({ form, field, error, isRequired }: NumberFieldProps) {
  const facts = MEASUREMENT_FIELDS.find((candidate) => candidate.field === field);
  if (!facts) return null;
  return (
    <Controller
      control={form.control}
      name={field}
      render={({ field: control }) => (
        <DecimalField
          label={facts.label}
          unit={facts.unit || undefined}
          value={control.value}
          onChange={control.onChange}
          onBlur={control.onBlur}
          error={error}
          isRequired={isRequired}
        />
      )}
    />
  );
}

/** What was typed, in the other unit: a wrong index or unit shows at once. */
function Conversion({ form }: { form: UseFormReturn<MeasureText> }) {
  const [flatKD, steepKD, index, flatMm, steepMm] = form
    .watch(['flatKD', 'steepKD', 'keratometricIndex', 'flatRadiusMm', 'steepRadiusMm'])
    .map((text) => parseDecimal(text) ?? undefined);
  const words = [
    ...(flatKD && steepKD && index
      ? [
          `${formatKeratometry(flatKD)} / ${formatKeratometry(steepKD)} D are ${formatMm(((index - 1) * 1000) / flatKD)} / ${formatMm(((index - 1) * 1000) / steepKD)} mm`,
        ]
      : []),
    ...(flatMm && steepMm
      ? [
          `${formatMm(flatMm)} / ${formatMm(steepMm)} mm are ${formatKeratometry(337.5 / flatMm)} / ${formatKeratometry(337.5 / steepMm)} D at 1.3375`,
        ]
      : []),
  ];
  return words.length === 0 ? null : <Text role="status">{words.join('; ')}</Text>;
}
