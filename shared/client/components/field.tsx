/**
 * Anatomy of a field: label, unit beside the label, hint, control, error. The error is tied to the control
 * by aria-describedby and is not shouted; a form's summary does that once.
 */
import { useId, useRef } from 'react';
import type { ReactNode, Ref } from 'react';
import { Pressable, TextInput, View } from 'react-native';
import type { TextInputProps, TextStyle } from 'react-native';
import { useTheme } from '@/shared/client/theme/theme-context';
import { FONT, RADIUS, SIZE, SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import type { Colours } from '@/shared/client/theme/tokens';
import { useFocusRing } from './focus-ring';
import { Text } from './text';

export interface FieldIds {
  labelledBy: string;
  describedBy: string | undefined;
}

export interface FieldFrameProps {
  label: string;
  unit?: string;
  hint?: string;
  error?: string;
  isRequired?: boolean;
  onPressLabel?: () => void;
  children: (ids: FieldIds) => ReactNode;
}

export function FieldFrame({
  label,
  unit,
  hint,
  error,
  isRequired,
  onPressLabel,
  children,
}: FieldFrameProps) {
  const id = useId();
  const ids = { label: `${id}-label`, unit: `${id}-unit`, hint: `${id}-hint`, error: `${id}-error` };
  // The unit is part of the name: who only hears the field must not have to guess millimetres.
  const labelledBy = unit ? `${ids.label} ${ids.unit}` : ids.label;
  const describedBy = [hint ? ids.hint : '', error ? ids.error : ''].filter(Boolean).join(' ') || undefined;
  return (
    <View style={{ gap: SPACE.xs, minWidth: 0 }}>
      <Pressable
        onPress={onPressLabel}
        tabIndex={-1}
        style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.xs, cursor: 'auto' }}
      >
        <Text variant="strong" id={ids.label}>
          {label}
        </Text>
        {unit ? <Text color="ink2" id={ids.unit}>{`(${unit})`}</Text> : null}
        {isRequired ? null : <Text color="ink2">optional</Text>}
      </Pressable>
      {hint ? (
        <Text variant="small" color="ink2" id={ids.hint}>
          {hint}
        </Text>
      ) : null}
      {children({ labelledBy, describedBy })}
      {error ? (
        <Text variant="small" color="stop" id={ids.error}>
          {`▪ ${error}`}
        </Text>
      ) : null}
    </View>
  );
}

export interface TextFieldProps {
  label: string;
  value: string;
  onChange: (text: string) => void;
  onBlur?: () => void;
  onSubmit?: () => void;
  unit?: string;
  hint?: string;
  error?: string;
  isRequired?: boolean;
  isDisabled?: boolean;
  isMultiline?: boolean;
  /** Numbers: tabular figures, decimal keyboard. */
  isNumber?: boolean;
  type?: 'text' | 'email' | 'password' | 'search';
  autoComplete?: TextInputProps['autoComplete'];
  autoFocus?: boolean;
  placeholder?: string;
  ref?: Ref<TextInput>;
}

export function TextField(props: TextFieldProps) {
  const own = useRef<TextInput>(null);
  const setRef = (element: TextInput | null) => {
    own.current = element;
    if (typeof props.ref === 'function') props.ref(element);
    else if (props.ref) props.ref.current = element;
  };
  return (
    <FieldFrame
      label={props.label}
      unit={props.unit}
      hint={props.hint}
      error={props.error}
      isRequired={props.isRequired}
      onPressLabel={() => own.current?.focus()}
    >
      {(ids) => <Input {...props} ref={setRef} ids={ids} />}
    </FieldFrame>
  );
}

function Input({
  ids,
  ref,
  ...props
}: Omit<TextFieldProps, 'ref'> & { ids: FieldIds; ref: (element: TextInput | null) => void }) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  return (
    <TextInput
      ref={ref}
      value={props.value}
      onChangeText={props.onChange}
      onSubmitEditing={props.onSubmit}
      {...described(props, ids)}
      editable={!props.isDisabled}
      multiline={props.isMultiline}
      secureTextEntry={props.type === 'password'}
      inputMode={props.isNumber ? 'decimal' : INPUT_MODES[props.type ?? 'text']}
      autoComplete={props.autoComplete ?? 'off'}
      autoCapitalize="none"
      autoCorrect={false}
      spellCheck={false}
      autoFocus={props.autoFocus}
      placeholder={props.placeholder}
      placeholderTextColor={colors.ink2}
      onFocus={ring.onFocus}
      onBlur={() => {
        ring.onBlur();
        props.onBlur?.();
      }}
      style={[inputStyle(props, colors), ring.style]}
    />
  );
}

const INPUT_MODES = { text: 'text', email: 'email', search: 'search', password: 'text' } as const;

function described({ error, isRequired }: InputLook, ids: FieldIds): object {
  return {
    'aria-labelledby': ids.labelledBy,
    'aria-describedby': ids.describedBy,
    'aria-invalid': error ? true : undefined,
    'aria-required': isRequired || undefined,
  };
}

type InputLook = Pick<TextFieldProps, 'error' | 'isRequired' | 'isMultiline' | 'isNumber' | 'isDisabled'>;

function inputStyle({ error, isMultiline, isNumber, isDisabled }: InputLook, colors: Colours): TextStyle {
  return {
    minHeight: isMultiline ? TOUCH_PX * 2 : TOUCH_PX,
    borderWidth: error ? 2 : 1,
    borderColor: error ? colors.stop : colors.line,
    borderRadius: RADIUS,
    backgroundColor: colors.surface,
    color: colors.ink,
    paddingHorizontal: SPACE.m,
    paddingVertical: SPACE.s,
    fontSize: SIZE.large,
    fontFamily: isNumber ? FONT.numbers : FONT.words,
    opacity: isDisabled ? 0.6 : 1,
  };
}

/** A number typed as text: `,` and `.` both mark decimals, the typed text stays as it is. */
export function DecimalField(props: Omit<TextFieldProps, 'isNumber' | 'type'>) {
  return <TextField {...props} isNumber />;
}
