/** What a date field takes, on every platform. */
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
