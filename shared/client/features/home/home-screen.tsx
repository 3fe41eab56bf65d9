/** Home: what waits for me, by role. */
import { useQuery } from '@tanstack/react-query';
import type { Href } from 'expo-router';
import { View } from 'react-native';
import { homeSchema, paths } from '@/shared/contract';
import type { Home } from '@/shared/contract';
import { call } from '@/shared/client/api/client';
import { useUser } from '@/shared/client/api/session-store';
import { Card } from '@/shared/client/components/card';
import { QueryView } from '@/shared/client/components/query-view';
import { RowLink } from '@/shared/client/components/row-link';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState } from '@/shared/client/components/states';
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
      <QueryView query={home} label="Looking what waits for you">
        {({ sections }) =>
          sections.length === 0 ? (
            <EmptyState
              title="Nothing waits for you"
              hint="Work for your role appears here as eyes move on."
            />
          ) : (
            <View style={{ flexDirection: isWide ? 'row' : 'column', flexWrap: 'wrap', gap: SPACE.l }}>
              {sections.map((section) => (
                <View
                  key={section.id}
                  style={isWide ? { flexBasis: '45%', flexGrow: 1, minWidth: 380 } : undefined}
                >
                  <Section section={section} />
                </View>
              ))}
            </View>
          )
        }
      </QueryView>
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
      {section.items.length === 0 ? null : (
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
      )}
      {more > 0 ? <Text color="ink2">{`and ${more} more`}</Text> : null}
    </Card>
  );
}
