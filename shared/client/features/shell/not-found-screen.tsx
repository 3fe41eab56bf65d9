import { Link } from '@/shared/client/components/link';
import { Screen } from '@/shared/client/components/screen';
import { Text } from '@/shared/client/components/text';

export function NotFoundScreen() {
  return (
    <Screen title="No such page" width="reading">
      <Text>
        This address does not lead anywhere. It may have been mistyped, or the thing it named is gone.
      </Text>
      <Link href="/home" label="Go to the start" kind="primary" />
    </Screen>
  );
}
