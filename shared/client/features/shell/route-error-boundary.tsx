/** When a screen breaks: say so, keep the rest of the page, offer a new try. */
import type { ErrorBoundaryProps } from 'expo-router';
import { View } from 'react-native';
import { asProblem } from '@/shared/client/api/problem';
import { ErrorPanel } from '@/shared/client/components/states';

export function RouteErrorBoundary({ error, retry }: ErrorBoundaryProps) {
  return (
    <View style={{ padding: 24 }}>
      <ErrorPanel problem={asProblem(error)} onRetry={() => void retry()} />
    </View>
  );
}
