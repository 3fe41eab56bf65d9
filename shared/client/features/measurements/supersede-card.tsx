/** A measurement is never edited: a better one supersedes it, with the reason. */
import { Controller } from 'react-hook-form';
import type { UseFormReturn } from 'react-hook-form';
import { METHOD_NAMES } from '@/shared/contract';
import type { EyeDesk } from '@/shared/contract';
import { Card } from '@/shared/client/components/card';
import { TextField } from '@/shared/client/components/field';
import { Select } from '@/shared/client/components/select';
import { formatDate, formatMm } from '@/shared/client/lib/format';
import type { MeasureText } from './measure-text';

export function SupersedeCard({
  form,
  desk,
  problem,
}: {
  form: UseFormReturn<MeasureText>;
  desk: EyeDesk;
  problem: string | undefined;
}) {
  const standing = desk.measurements.filter((measurement) => measurement.supersededById === null);
  const supersedesId = form.watch('supersedesId');
  if (standing.length === 0) return null;
  const options = [
    { value: '', label: 'none: it stands beside the others' },
    ...standing.map(({ id, values }) => ({
      value: id,
      label: `${formatDate(values.measuredAt)}, ${METHOD_NAMES[values.method]}, ${formatMm(values.axialLengthMm)} mm`,
    })),
  ];
  return (
    <Card title="Does it supersede another?">
      <Controller
        control={form.control}
        name="supersedesId"
        render={({ field }) => (
          <Select label="Supersedes" options={options} value={field.value} onChange={field.onChange} />
        )}
      />
      {supersedesId ? (
        <Controller
          control={form.control}
          name="reason"
          render={({ field }) => (
            <TextField
              label="Reason"
              value={field.value}
              onChange={field.onChange}
              error={problem}
              isRequired
            />
          )}
        />
      ) : null}
    </Card>
  );
}
