/** Choosing one of few (radio group, arrow keys) or several (checkboxes). */
import { useRef } from 'react';
import { Pressable, View } from 'react-native';
import Svg, { Circle, Path, Rect } from 'react-native-svg';
import { useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SPACE, TOUCH_PX } from '@/shared/client/theme/tokens';
import { FieldFrame } from './field';
import type { FieldIds } from './field';
import { useFocusRing } from './focus-ring';
import { Text } from './text';

export interface Option<T extends string> {
  value: T;
  label: string;
  hint?: string;
}

export interface RadioGroupProps<T extends string> {
  label: string;
  options: readonly Option<T>[];
  /** Null while nothing is chosen. */
  value: T | null;
  onChange: (value: T) => void;
  hint?: string;
  error?: string;
  isRequired?: boolean;
  isDisabled?: boolean;
  /** One above the other instead of side by side. */
  isStacked?: boolean;
}

export function RadioGroup<T extends string>(props: RadioGroupProps<T>) {
  return (
    <FieldFrame
      label={props.label}
      hint={props.hint}
      error={props.error}
      isRequired={props.isRequired ?? true}
    >
      {(ids) => <Radios {...props} ids={ids} />}
    </FieldFrame>
  );
}

interface KeyPress {
  key: string;
  preventDefault: () => void;
}

/** The press handling of the library hears the space bar on buttons only; here it must not scroll the page either. */
function isSpace(event: KeyPress): boolean {
  if (event.key !== ' ') return false;
  event.preventDefault();
  return true;
}

const NEXT_KEYS = ['ArrowRight', 'ArrowDown'];
const PREVIOUS_KEYS = ['ArrowLeft', 'ArrowUp'];

function Radios<T extends string>({
  options,
  value,
  onChange,
  isDisabled,
  isStacked,
  ids,
}: RadioGroupProps<T> & { ids: FieldIds }) {
  const elements = useRef<(View | null)[]>([]);
  const chosen = options.findIndex((option) => option.value === value);
  const move = (index: number) => {
    const target = (index + options.length) % options.length;
    const option = options[target];
    if (!option) return;
    onChange(option.value);
    (elements.current[target] as unknown as { focus?: () => void } | null)?.focus?.();
  };
  return (
    <View
      role="radiogroup"
      aria-labelledby={ids.labelledBy}
      {...({ 'aria-describedby': ids.describedBy } as object)}
      style={{
        flexDirection: isStacked ? 'column' : 'row',
        flexWrap: isStacked ? 'nowrap' : 'wrap',
        gap: SPACE.s,
      }}
    >
      {options.map((option, index) => (
        <Radio
          key={option.value}
          option={option}
          isChosen={index === chosen}
          isTabStop={index === Math.max(chosen, 0)}
          isDisabled={isDisabled ?? false}
          onChoose={() => onChange(option.value)}
          onStep={(step) => move(index + step)}
          setElement={(element) => {
            elements.current[index] = element;
          }}
        />
      ))}
    </View>
  );
}

interface RadioProps {
  option: Option<string>;
  isChosen: boolean;
  isTabStop: boolean;
  isDisabled: boolean;
  onChoose: () => void;
  onStep: (step: 1 | -1) => void;
  setElement: (element: View | null) => void;
}

function Radio({ option, isChosen, isTabStop, isDisabled, onChoose, onStep, setElement }: RadioProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const onKeyDown = (event: KeyPress) => {
    if (isDisabled) return;
    if (isSpace(event)) onChoose();
    const step = NEXT_KEYS.includes(event.key) ? 1 : PREVIOUS_KEYS.includes(event.key) ? -1 : undefined;
    if (step === undefined) return;
    event.preventDefault();
    onStep(step);
  };
  return (
    <Pressable
      ref={setElement}
      role="radio"
      aria-checked={isChosen}
      disabled={isDisabled}
      onPress={onChoose}
      onFocus={ring.onFocus}
      onBlur={ring.onBlur}
      {...({ onKeyDown, tabIndex: isTabStop && !isDisabled ? 0 : -1 } as object)}
      style={[
        {
          minHeight: TOUCH_PX,
          flexDirection: 'row',
          alignItems: 'center',
          gap: SPACE.s,
          paddingHorizontal: SPACE.m,
          paddingVertical: SPACE.xs,
          borderWidth: isChosen ? 2 : 1,
          borderColor: isChosen ? colors.sea : colors.line,
          borderRadius: RADIUS,
          backgroundColor: colors.surface,
          opacity: isDisabled ? 0.6 : 1,
        },
        ring.style,
      ]}
    >
      <Svg width={16} height={16} style={{ flexShrink: 0 }} aria-hidden>
        <Circle
          cx={8}
          cy={8}
          r={6.5}
          fill="none"
          stroke={isChosen ? colors.sea : colors.line}
          strokeWidth={1.5}
        />
        {isChosen ? <Circle cx={8} cy={8} r={3.5} fill={colors.sea} /> : null}
      </Svg>
      <View style={{ flexShrink: 1 }}>
        <Text variant={isChosen ? 'strong' : 'body'}>{option.label}</Text>
        {option.hint ? (
          <Text variant="small" color="ink2">
            {option.hint}
          </Text>
        ) : null}
      </View>
    </Pressable>
  );
}

export interface CheckboxProps {
  label: string;
  hint?: string;
  isChecked: boolean;
  onChange: (isChecked: boolean) => void;
  isDisabled?: boolean;
}

export function Checkbox({ label, hint, isChecked, onChange, isDisabled = false }: CheckboxProps) {
  const { colors } = useTheme();
  const ring = useFocusRing();
  const turn = () => onChange(!isChecked);
  return (
    <Pressable
      role="checkbox"
      aria-checked={isChecked}
      aria-label={label}
      disabled={isDisabled}
      onPress={turn}
      {...({
        onKeyDown: (event: KeyPress) => (!isDisabled && isSpace(event) ? turn() : undefined),
      } as object)}
      onFocus={ring.onFocus}
      onBlur={ring.onBlur}
      style={[
        {
          minHeight: TOUCH_PX,
          flexDirection: 'row',
          alignItems: 'center',
          gap: SPACE.s,
          opacity: isDisabled ? 0.6 : 1,
          borderRadius: RADIUS,
        },
        ring.style,
      ]}
    >
      <Svg width={20} height={20} style={{ flexShrink: 0 }} aria-hidden>
        <Rect
          x={1}
          y={1}
          width={18}
          height={18}
          rx={3}
          fill={isChecked ? colors.sea : 'none'}
          stroke={isChecked ? colors.sea : colors.line}
          strokeWidth={1.5}
        />
        {isChecked ? (
          <Path d="M4.5 10.5 L8.5 14.5 L15.5 6" fill="none" stroke={colors.onSea} strokeWidth={2.2} />
        ) : null}
      </Svg>
      <View style={{ flexShrink: 1 }}>
        <Text>{label}</Text>
        {hint ? (
          <Text variant="small" color="ink2">
            {hint}
          </Text>
        ) : null}
      </View>
    </Pressable>
  );
}
