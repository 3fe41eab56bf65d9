/** The left rail of a desk: the practice, the places, who is signed in. */
import { usePathname } from 'expo-router';
import { View } from 'react-native';
import { ROLE_NAMES } from '@/shared/contract';
import type { SessionUser } from '@/shared/contract';
import { signOut } from '@/shared/client/api/session';
import { Button } from '@/shared/client/components/button';
import { Link } from '@/shared/client/components/link';
import { NavLink } from '@/shared/client/components/nav-link';
import { Text } from '@/shared/client/components/text';
import { useTheme } from '@/shared/client/theme/theme-context';
import { SPACE } from '@/shared/client/theme/tokens';
import { Wordmark } from './wordmark';
import { PlaceIcon } from './place-icon';
import type { Place } from './places';

interface RailProps {
  user: SessionUser;
  places: Place[];
  practiceName: string | undefined;
  onShowKeys: () => void;
}

export function Rail({ user, places, practiceName, onShowKeys }: RailProps) {
  const { colors } = useTheme();
  const path = usePathname();
  return (
    <View
      role="navigation"
      aria-label="Places"
      style={{
        width: 224,
        backgroundColor: colors.surface,
        borderRightWidth: 1,
        borderRightColor: colors.line,
        paddingVertical: SPACE.l,
        gap: SPACE.l,
      }}
    >
      <View style={{ paddingHorizontal: SPACE.l, gap: SPACE.xs }}>
        <Wordmark />
        <Text variant="small" color="ink2">
          {practiceName ?? ' '}
        </Text>
      </View>
      <View style={{ gap: 2, flex: 1 }}>
        {places.map((place) => (
          <NavLink
            key={place.href}
            href={place.href}
            label={place.label}
            isCurrent={path.startsWith(place.href)}
            shape="rail"
            icon={(colour) => <PlaceIcon path={place.icon} colour={colour} />}
          />
        ))}
      </View>
      <View style={{ paddingHorizontal: SPACE.l, gap: SPACE.s }}>
        <Text variant="strong">{user.displayName}</Text>
        <Text variant="small" color="ink2">
          {user.roles.map((role) => ROLE_NAMES[role]).join(', ')}
        </Text>
        <Link href="/about" label="About and settings" />
        <View style={{ marginLeft: -SPACE.s }}>
          <Button label="Keys" kind="plain" onPress={onShowKeys} />
        </View>
        <Button label="Sign out" onPress={() => void signOut()} isWide />
      </View>
    </View>
  );
}
