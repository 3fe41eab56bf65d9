/** Flags of the check step: severity in word and shape, what was found, what to do, where the rule comes from. */
import type { ReactNode } from 'react';
import { View } from 'react-native';
import type { Flag, Severity } from '@/shared/contract';
import { formatInstant } from '@/shared/client/lib/format';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Mark } from './mark';
import { Text } from './text';

const ORDER: readonly Severity[] = ['stop', 'weigh', 'note'];

/** Stops first, and among them the unsettled ones. */
export function sortedFlags(flags: readonly Flag[]): Flag[] {
  const rank = (flag: Flag) => ORDER.indexOf(flag.severity) * 2 + (flag.settlement ? 1 : 0);
  return [...flags].sort((a, b) => rank(a) - rank(b));
}

export function FlagList({
  flags,
  actionFor,
}: {
  flags: readonly Flag[];
  actionFor?: (flag: Flag) => ReactNode;
}) {
  const { colors } = useTheme();
  return (
    <View role="list" aria-label="Flags">
      {sortedFlags(flags).map((flag, index) => (
        <View
          key={flag.ruleId}
          role="listitem"
          style={{
            paddingVertical: SPACE.m,
            gap: SPACE.xs,
            borderTopWidth: index === 0 ? 0 : 1,
            borderTopColor: colors.hairline,
          }}
        >
          <Mark
            tone={flag.severity}
            label={flag.settlement ? `${WORDS[flag.severity]}, settled` : WORDS[flag.severity]}
          />
          <Text>{flag.message}</Text>
          {flag.advice ? <Text color="ink2">{flag.advice}</Text> : null}
          <Text variant="small" color="ink2">{`Source: ${flag.source} [${flag.mark}]`}</Text>
          {flag.settlement ? (
            <Text variant="small">{`Settled by ${flag.settlement.by}, ${formatInstant(flag.settlement.at)}: ${flag.settlement.reason}`}</Text>
          ) : null}
          {actionFor?.(flag)}
        </View>
      ))}
    </View>
  );
}

const WORDS: Record<Severity, string> = { stop: 'Stop', weigh: 'Weigh', note: 'Note' };
