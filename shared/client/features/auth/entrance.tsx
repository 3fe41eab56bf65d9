/** The page outside the gate: the name, the practice, one form. */
import type { ReactNode } from 'react';
import { ScrollView, View } from 'react-native';
import Head from 'expo-router/head';
import { DemoBanner } from '@/shared/client/components/demo-banner';
import { Text } from '@/shared/client/components/text';
import { Wordmark } from '@/shared/client/features/shell/wordmark';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';

interface EntranceProps {
  title: string;
  lead?: string;
  isDemo?: boolean;
  children: ReactNode;
}

export function Entrance({ title, lead, isDemo, children }: EntranceProps) {
  const { colors } = useTheme();
  return (
    <View style={{ flex: 1, backgroundColor: colors.paper }}>
      <Head>
        <title>{`${title} · Landfall`}</title>
      </Head>
      {isDemo ? <DemoBanner /> : null}
      <ScrollView
        role="main"
        contentContainerStyle={{ flexGrow: 1, justifyContent: 'center', padding: SPACE.l }}
        tabIndex={-1}
      >
        <View style={{ width: '100%', maxWidth: 460, alignSelf: 'center', gap: SPACE.xl }}>
          <Wordmark isLarge />
          <View style={{ gap: SPACE.xs }}>
            <Text variant="title" level={1}>
              {title}
            </Text>
            {lead ? <Text color="ink2">{lead}</Text> : null}
          </View>
          {children}
        </View>
      </ScrollView>
    </View>
  );
}
