/** The page outside the gate: the name, the practice, one form. */
import type { ReactNode } from 'react';
import { ScrollView, View } from 'react-native';
import Head from 'expo-router/head';
import { ChartGround } from '@/shared/client/components/chart-ground';
import { Text } from '@/shared/client/components/text';
import { useHeadingFocus } from '@/shared/client/components/use-heading-focus';
import { Wordmark } from '@/shared/client/features/shell/wordmark';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';

/** Where the coast keeps clear of the form. */
const CHART_FROM_PX = 1280;

interface EntranceProps {
  title: string;
  lead?: string;
  children: ReactNode;
}

export function Entrance({ title, lead, children }: EntranceProps) {
  const { colors } = useTheme();
  const { widthPx } = useLayout();
  const heading = useHeadingFocus();
  return (
    <View style={{ flex: 1, backgroundColor: colors.paper }}>
      <Head>
        <title>{`${title} · Landfall`}</title>
      </Head>
      {widthPx >= CHART_FROM_PX ? <ChartGround /> : null}
      <ScrollView
        role="main"
        contentContainerStyle={{ flexGrow: 1, justifyContent: 'center', padding: SPACE.l }}
        tabIndex={-1}
      >
        <View style={{ width: '100%', maxWidth: 460, alignSelf: 'center', gap: SPACE.xl }}>
          <Wordmark isLarge />
          <View style={{ gap: SPACE.xs }}>
            <Text variant="title" level={1} ref={heading} isFocusable>
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
