/** A date typed as YYYY-MM-DD, where the platform has no date control of its own. */
import type { DateFieldProps } from './date-field-props';
import { TextField } from './field';

export function DateField({ min: _min, max: _max, hint, ...props }: DateFieldProps) {
  return <TextField {...props} isNumber hint={hint ?? 'YYYY-MM-DD'} />;
}
