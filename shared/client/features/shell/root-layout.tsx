/** Providers, fonts, and the frame that stands on every page, signed in or not. */
import { useEffect } from 'react';
import { QueryClientProvider } from '@tanstack/react-query';
import { Stack } from 'expo-router';
import { SafeAreaProvider } from 'react-native-safe-area-context';
import { queryClient } from '@/shared/client/api/query-client';
import { loadFonts } from '@/shared/client/theme/load-fonts';
import { ThemeProvider } from '@/shared/client/theme/theme-context';
import { DemoFrame } from './demo-frame';

export function RootLayout() {
  // Words are shown at once in a fallback face: a slow or missing font must not keep anybody from reading.
  useEffect(() => {
    loadFonts().catch(() => undefined);
  }, []);
  return (
    <SafeAreaProvider>
      <QueryClientProvider client={queryClient}>
        <ThemeProvider>
          <DemoFrame>
            <Stack screenOptions={{ headerShown: false, animation: 'none' }} />
          </DemoFrame>
        </ThemeProvider>
      </QueryClientProvider>
    </SafeAreaProvider>
  );
}
