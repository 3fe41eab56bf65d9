/** The surgeon's decisions before the candidates: measurement, target, tolerance, formulas, lens models. */
import { useState } from 'react';
import {
  AXIAL_LENGTH_ADJUSTMENTS,
  FORMULA_IDS,
  FORMULA_NAMES,
  LENS_KIND_NAMES,
  MAX_LENSES_IN_PLAN,
  parseDecimal,
  TARGET_LIMITS_D,
  TOLERANCES_D,
} from '@/shared/contract';
import type { PlanChange, PlanDesk } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { Checkbox, RadioGroup } from '@/shared/client/components/choices';
import { DecimalField, TextField } from '@/shared/client/components/field';
import { Select } from '@/shared/client/components/select';
import { Text } from '@/shared/client/components/text';
import { formatDate, formatDioptres } from '@/shared/client/lib/format';

interface PlanInputsProps {
  desk: PlanDesk;
  isBusy: boolean;
  onChange: (change: Partial<PlanChange>) => void;
}

const ADJUSTMENT_NAMES: Record<(typeof AXIAL_LENGTH_ADJUSTMENTS)[number], string> = {
  none: 'none',
  wangKoch2011: 'Wang–Koch 2011',
  wangKoch2018: 'Wang–Koch 2018',
};

export function PlanInputs({ desk, isBusy, onChange }: PlanInputsProps) {
  return (
    <>
      <Card title="Aim">
        <TargetField
          key={desk.plan.input.targetD}
          targetD={desk.plan.input.targetD}
          isBusy={isBusy}
          onChange={(targetD) => onChange({ targetD, choice: null })}
        />
        <RadioGroup
          label="Tolerance"
          hint="The chance of landing counts refractions this close to the target."
          options={TOLERANCES_D.map((toleranceD) => ({
            value: String(toleranceD),
            label: `±${toleranceD.toFixed(2)} D`,
          }))}
          value={String(desk.plan.input.toleranceD)}
          onChange={(text) =>
            onChange({ toleranceD: TOLERANCES_D.find((toleranceD) => String(toleranceD) === text) })
          }
          isDisabled={isBusy}
        />
      </Card>
      <LensChoice desk={desk} isBusy={isBusy} onChange={onChange} />
      <FormulaChoice desk={desk} isBusy={isBusy} onChange={onChange} />
    </>
  );
}

function TargetField({
  targetD,
  isBusy,
  onChange,
}: {
  targetD: number;
  isBusy: boolean;
  onChange: (targetD: number) => void;
}) {
  const [text, setText] = useState(formatDioptres(targetD));
  const [error, setError] = useState<string>();
  const commit = () => {
    const value = parseDecimal(text);
    const isAllowed =
      typeof value === 'number' && value >= TARGET_LIMITS_D.min && value <= TARGET_LIMITS_D.max;
    if (!isAllowed)
      return setError(
        `A number between ${formatDioptres(TARGET_LIMITS_D.min)} and ${formatDioptres(TARGET_LIMITS_D.max)} D`,
      );
    setError(undefined);
    if (value !== targetD) onChange(value);
  };
  return (
    <DecimalField
      label="Target refraction"
      unit="D"
      hint="Negative is nearsighted. Changing it clears the chosen power."
      value={text}
      onChange={setText}
      onBlur={commit}
      onSubmit={commit}
      error={error}
      isDisabled={isBusy}
      isRequired
    />
  );
}

function LensChoice({ desk, isBusy, onChange }: PlanInputsProps) {
  const { lensIds } = desk.plan.input;
  const toggle = (id: string, isChecked: boolean) => {
    const next = isChecked ? [...lensIds, id] : lensIds.filter((other) => other !== id);
    const keepsChoice = desk.plan.choice !== null && next.includes(desk.plan.choice.lensId);
    onChange({ lensIds: next, ...(keepsChoice ? {} : { choice: null }) });
  };
  return (
    <Card title="Lens models">
      <Text variant="small" color="ink2">{`Compare up to ${MAX_LENSES_IN_PLAN}.`}</Text>
      {desk.lenses.map((lens) => {
        const isChecked = lensIds.includes(lens.id);
        const isLast = isChecked && lensIds.length === 1;
        return (
          <Checkbox
            key={lens.id}
            label={lens.name}
            hint={`${LENS_KIND_NAMES[lens.kind]}${lens.isToric ? ', toric' : ''}${lens.isDemo ? ', invented' : ''}`}
            isChecked={isChecked}
            onChange={(next) => toggle(lens.id, next)}
            isDisabled={isBusy || isLast || (!isChecked && lensIds.length >= MAX_LENSES_IN_PLAN)}
          />
        );
      })}
    </Card>
  );
}

function FormulaChoice({ desk, isBusy, onChange }: PlanInputsProps) {
  const { input } = desk.plan;
  const { suggestion } = desk.calculation;
  const usable = desk.measurements.filter(
    (measurement) => measurement.supersededById === null || measurement.id === input.measurementId,
  );
  const suggested = suggestion.formulas.map((formula) => FORMULA_NAMES[formula]).join(' or ');
  return (
    <Card title="Calculation">
      <Text>{`Suggested here: ${suggested}.`}</Text>
      <Text
        variant="small"
        color="ink2"
      >{`${suggestion.reason} Source: ${suggestion.source} [${suggestion.mark}]`}</Text>
      <Select
        label="Leading formula"
        hint="Its landing is drawn and signed."
        options={[
          { value: '', label: 'the suggested one' },
          ...input.formulas.map((value) => ({ value, label: FORMULA_NAMES[value] })),
        ]}
        value={input.leadingFormula ?? ''}
        onChange={(value) =>
          onChange({ leadingFormula: input.formulas.find((formula) => formula === value) ?? null })
        }
        isDisabled={isBusy}
      />
      {FORMULA_IDS.map((formula) => {
        const isChecked = input.formulas.includes(formula);
        const next = (isOn: boolean) =>
          FORMULA_IDS.filter((other) => (other === formula ? isOn : input.formulas.includes(other)));
        return (
          <Checkbox
            key={formula}
            label={FORMULA_NAMES[formula]}
            isChecked={isChecked}
            onChange={(isOn) =>
              onChange({
                formulas: next(isOn),
                ...(input.leadingFormula === formula && !isOn ? { leadingFormula: null } : {}),
              })
            }
            isDisabled={isBusy || (isChecked && input.formulas.length === 1)}
          />
        );
      })}
      <Select
        label="Axial length adjustment for long eyes"
        options={AXIAL_LENGTH_ADJUSTMENTS.map((value) => ({ value, label: ADJUSTMENT_NAMES[value] }))}
        value={input.axialLengthAdjustment}
        onChange={(axialLengthAdjustment) => onChange({ axialLengthAdjustment })}
        isDisabled={isBusy}
      />
      {usable.length > 1 ? (
        <Select
          label="Measurement"
          options={usable.map((m) => ({
            value: m.id,
            label: `${formatDate(m.values.measuredAt)}, ${m.values.method}${m.isOfRecord ? ' (of record)' : ''}`,
          }))}
          value={input.measurementId}
          onChange={(measurementId) => onChange({ measurementId, choice: null })}
          isDisabled={isBusy}
        />
      ) : null}
      <NoteField key={input.note} note={input.note} onChange={(note) => onChange({ note })} />
    </Card>
  );
}

function NoteField({ note, onChange }: { note: string; onChange: (note: string) => void }) {
  const [text, setText] = useState(note);
  return (
    <TextField
      label="Note on the plan"
      value={text}
      onChange={setText}
      onBlur={() => (text === note ? undefined : onChange(text))}
      isMultiline
    />
  );
}
