/** What a select takes, on every platform. */
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
