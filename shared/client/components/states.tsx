/** What a screen shows while it waits, when something failed, and when there is nothing yet. */
import { View } from 'react-native';
import type { ReactNode } from 'react';
import type { ApiProblem } from '@/shared/client/api/problem';
import { useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SPACE } from '@/shared/client/theme/tokens';
import { Button } from './button';
import { Card, Row } from './card';
import { Mark } from './mark';
import { Text } from './text';

/** Grey lines where the content will stand. */
export function Loading({ label = 'Loading', lines = 4 }: { label?: string; lines?: number }) {
  const { colors } = useTheme();
  return (
    <View role="status" aria-busy aria-label={label} style={{ gap: SPACE.m }}>
      {Array.from({ length: lines }, (_, index) => (
        <View
          key={index}
          style={{
            height: index === 0 ? 28 : 44,
            width: index === 0 ? '40%' : '100%',
            backgroundColor: colors.hairline,
            borderRadius: RADIUS,
          }}
        />
      ))}
    </View>
  );
}

interface ErrorPanelProps {
  problem: ApiProblem;
  onRetry?: () => void;
  /** What was kept: `What you typed is still here.` */
  kept?: string;
}

export function ErrorPanel({ problem, onRetry, kept }: ErrorPanelProps) {
  return (
    <Card tone="stop" label="Error">
      <View role="alert" style={{ gap: SPACE.s }}>
        <Mark tone="stop" label={problem.title} />
        {problem.detail ? <Text>{problem.detail}</Text> : null}
        {problem.errors.map((error) => (
          <Text key={`${error.path} ${error.message}`}>{`▪ ${error.message}`}</Text>
        ))}
        {kept ? <Text color="ink2">{kept}</Text> : null}
        {problem.requestId ? (
          <Text variant="small" color="ink2">{`When you ask for help, quote ${problem.requestId}`}</Text>
        ) : null}
      </View>
      {onRetry ? <Button label="Try again" onPress={onRetry} /> : null}
    </Card>
  );
}

export function EmptyState({ title, hint, action }: { title: string; hint: string; action?: ReactNode }) {
  return (
    <Card label={title}>
      <Text variant="heading">{title}</Text>
      <Text color="ink2">{hint}</Text>
      {action ? <Row>{action}</Row> : null}
    </Card>
  );
}

/** A message that something went well; read out once, never used for errors. */
export function SuccessNote({ text }: { text: string }) {
  return (
    <View role="status" style={{ paddingVertical: SPACE.s }}>
      <Mark tone="fair" label={text} />
    </View>
  );
}

export function ProgressBar({ label, done, total }: { label: string; done: number; total: number }) {
  const { colors } = useTheme();
  const share = total > 0 ? Math.min(done / total, 1) : 0;
  return (
    <View style={{ gap: SPACE.xs }}>
      <Text role="status">{`${label}: ${done.toLocaleString('en-GB')} of ${total.toLocaleString('en-GB')}`}</Text>
      <View
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={total}
        aria-valuenow={done}
        style={{ height: 10, borderRadius: 5, backgroundColor: colors.hairline, overflow: 'hidden' }}
      >
        <View style={{ height: 10, width: `${share * 100}%`, backgroundColor: colors.sea }} />
      </View>
    </View>
  );
}
