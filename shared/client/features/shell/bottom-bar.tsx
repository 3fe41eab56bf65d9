/** The foot of a phone: at most five places at thumb height; what does not fit stands under "More". */
import { useState } from 'react';
import { usePathname } from 'expo-router';
import { View } from 'react-native';
import { ROLE_NAMES } from '@/shared/contract';
import type { SessionUser } from '@/shared/contract';
import { signOut } from '@/shared/client/api/session';
import { BarButton } from '@/shared/client/components/bar-button';
import { Button } from '@/shared/client/components/button';
import { Dialog } from '@/shared/client/components/dialog';
import { NavLink } from '@/shared/client/components/nav-link';
import { Text } from '@/shared/client/components/text';
import { useTheme } from '@/shared/client/theme/theme-context';
import { PlaceIcon } from './place-icon';
import { BAR_PLACES_MAX } from './places';
import type { Place } from './places';

const ABOUT: Place = {
  href: '/about',
  label: 'About and settings',
  icon: 'M12 3 a9 9 0 1 0 0.01 0 M12 11 V16 M12 7.5 V8',
};
const MORE_ICON = 'M5 12 h0.01 M12 12 h0.01 M19 12 h0.01';

export function BottomBar({ user, places }: { user: SessionUser; places: Place[] }) {
  const { colors } = useTheme();
  const path = usePathname();
  // Open at one address: going anywhere, by a link or by Back, closes it.
  const [openAt, setOpenAt] = useState<string>();
  const shown = places.slice(0, BAR_PLACES_MAX - 1);
  const rest = [...places.slice(BAR_PLACES_MAX - 1), ABOUT];
  const link = (place: Place, shape: 'bar' | 'rail') => (
    <NavLink
      key={place.href}
      href={place.href}
      label={place.label}
      isCurrent={path.startsWith(place.href)}
      shape={shape}
      icon={(colour) => <PlaceIcon path={place.icon} colour={colour} />}
    />
  );
  return (
    <View
      role="navigation"
      aria-label="Places"
      style={{
        flexDirection: 'row',
        backgroundColor: colors.surface,
        borderTopWidth: 1,
        borderTopColor: colors.line,
      }}
    >
      {shown.map((place) => link(place, 'bar'))}
      <BarButton
        label="More"
        icon={(colour) => <PlaceIcon path={MORE_ICON} colour={colour} />}
        onPress={() => setOpenAt(path)}
      />
      <Dialog
        title="More"
        isOpen={openAt === path}
        onClose={() => setOpenAt(undefined)}
        cancelLabel="Close"
        actions={<Button label="Sign out" onPress={() => void signOut()} />}
      >
        <Text variant="strong">{user.displayName}</Text>
        <Text color="ink2">{user.roles.map((role) => ROLE_NAMES[role]).join(', ')}</Text>
        <View>{rest.map((place) => link(place, 'rail'))}</View>
      </Dialog>
    </View>
  );
}
