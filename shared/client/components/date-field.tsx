/** A date typed as YYYY-MM-DD, where the platform has no date control of its own. */
import { TextField } from './field';

export interface DateFieldProps {
  label: string;
  /** ISO date or empty. */
  value: string;
  onChange: (isoDate: string) => void;
  onBlur?: () => void;
  min?: string;
  max?: string;
  hint?: string;
  error?: string;
  isRequired?: boolean;
}

export function DateField({ min: _min, max: _max, hint, ...props }: DateFieldProps) {
  return <TextField {...props} isNumber hint={hint ?? 'YYYY-MM-DD'} />;
}
