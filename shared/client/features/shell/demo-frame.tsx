/** Round every page, signed in or not: in the demonstration none can be seen without the word that it is one. */
import type { ReactNode } from 'react';
import { View } from 'react-native';
import { useQuery } from '@tanstack/react-query';
import { practiceQuery } from '@/shared/client/features/auth/use-practice';
import { DemoBanner } from '@/shared/client/components/demo-banner';
import { useTheme } from '@/shared/client/theme/theme-context';

export function DemoFrame({ children }: { children: ReactNode }) {
  const { colors } = useTheme();
  const { data: practice } = useQuery(practiceQuery());
  return (
    <View style={{ flex: 1, backgroundColor: colors.paper }}>
      {practice?.isDemo ? <DemoBanner /> : null}
      <View style={{ flex: 1, minHeight: 0 }}>{children}</View>
    </View>
  );
}
