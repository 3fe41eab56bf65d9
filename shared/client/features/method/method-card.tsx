/** One method: equations with their marks, sources, where it holds, what was compared, what is not known. */
import { View } from 'react-native';
import { Card } from '@/shared/client/components/card';
import { Mark } from '@/shared/client/components/mark';
import { Text } from '@/shared/client/components/text';
import { SPACE } from '@/shared/client/theme/tokens';

interface MethodFactsShown {
  name: string;
  equations: readonly { text: string; mark: string }[];
  sources: readonly { citation: string; mark: string }[];
  validRange: string;
  checks: readonly string[];
  notKnown: readonly string[];
}

export function MethodCard({ facts, caution }: { facts: MethodFactsShown; caution: string | null }) {
  return (
    <Card label={facts.name}>
      <Text variant="heading" level={3}>
        {facts.name}
      </Text>
      {caution ? <Mark tone="weigh" label={caution} /> : null}
      <View style={{ gap: SPACE.xs }}>
        {facts.equations.map((equation) => (
          <Text key={equation.text} isNumber variant="small" style={{ overflowWrap: 'anywhere' } as object}>
            {`${equation.text}  [${equation.mark}]`}
          </Text>
        ))}
      </View>
      <Part title="Where it holds" lines={[facts.validRange]} />
      <Part title="Sources" lines={facts.sources.map((source) => `${source.citation} [${source.mark}]`)} />
      <Part title="Compared with" lines={facts.checks} />
      <Part title="Not known" lines={facts.notKnown} />
    </Card>
  );
}

function Part({ title, lines }: { title: string; lines: readonly string[] }) {
  if (lines.length === 0) return null;
  return (
    <View style={{ gap: 2 }}>
      <Text variant="strong">{title}</Text>
      {lines.map((line) => (
        <Text key={line}>{line}</Text>
      ))}
    </View>
  );
}
