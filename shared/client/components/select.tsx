/** One of many where the platform has no select of its own: a stacked radio group. */
import { RadioGroup } from './choices';
import type { SelectProps } from './select-props';

export function Select<T extends string>(props: SelectProps<T>) {
  return <RadioGroup {...props} isStacked />;
}
