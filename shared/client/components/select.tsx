/** One of many where the platform has no select of its own: a stacked radio group. */
import { RadioGroup } from './choices';
import type { Option } from './choices';

export interface SelectProps<T extends string> {
  label: string;
  options: readonly Option<T>[];
  value: T;
  onChange: (value: T) => void;
  hint?: string;
  error?: string;
  isRequired?: boolean;
  isDisabled?: boolean;
}

export function Select<T extends string>(props: SelectProps<T>) {
  return <RadioGroup {...props} isStacked />;
}
