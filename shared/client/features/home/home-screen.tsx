/** Home: what waits for me, by role. */
import { useQuery } from '@tanstack/react-query';
import type { Href } from 'expo-router';
import { View } from 'react-native';
import { homeSchema, paths } from '@/shared/contract';
import type { Home } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { asProblem } from '@/shared/client/api/problem';
import { useUser } from '@/shared/client/api/session-store';
import { Card } from '@/shared/client/components/card';
import { RowLink } from '@/shared/client/components/row-link';
import { Screen } from '@/shared/client/components/screen';
import { ErrorPanel, Loading } from '@/shared/client/components/states';
import { Text } from '@/shared/client/components/text';
import { formatCount } from '@/shared/client/lib/format';
import { useLayout } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';

export function HomeScreen() {
  const user = useUser();
  const home = useQuery({
    queryKey: ['home'],
    queryFn: ({ signal }) => call(paths.home(), homeSchema, { signal }),
    staleTime: 0,
  });
  const { isWide } = useLayout();
  return (
    <Screen title="What waits for you" lead={user.displayName}>
      {home.isPending ? <Loading lines={6} /> : null}
      {home.error ? <ErrorPanel problem={asProblem(home.error)} onRetry={() => void home.refetch()} /> : null}
      {home.data ? (
        <View style={{ flexDirection: isWide ? 'row' : 'column', flexWrap: 'wrap', gap: SPACE.l }}>
          {home.data.sections.map((section) => (
            <View
              key={section.id}
              style={isWide ? { flexBasis: '45%', flexGrow: 1, minWidth: 380 } : undefined}
            >
              <Section section={section} />
            </View>
          ))}
        </View>
      ) : null}
    </Screen>
  );
}

function Section({ section }: { section: Home['sections'][number] }) {
  const more = section.total - section.items.length;
  return (
    <Card
      title={section.title}
      tone={section.total > 0 ? 'sea' : undefined}
      aside={
        <Text
          variant="title"
          isNumber
          color={section.total > 0 ? 'sea' : 'ink2'}
          aria-label={formatCount(section.total, 'item')}
        >
          {section.total}
        </Text>
      }
    >
      {section.total === 0 ? <Text color="ink2">{section.emptyHint}</Text> : null}
      <View role="list">
        {section.items.map((item, index) => (
          <RowLink
            key={`${item.href} ${index}`}
            href={item.href as Href}
            title={item.title}
            detail={item.detail}
            side={item.side}
            hasRule={index > 0}
          />
        ))}
      </View>
      {more > 0 ? <Text color="ink2">{`and ${more} more`}</Text> : null}
    </Card>
  );
}
