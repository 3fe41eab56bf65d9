/**
 * The frame of the house: a rail on the left of a desk, a bar at the foot of a phone, and the keys that work
 * everywhere.
 */
import { useState } from 'react';
import type { ReactNode } from 'react';
import { View } from 'react-native';
import { useQuery } from '@tanstack/react-query';
import type { SessionUser } from '@/shared/contract';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { practiceQuery } from '@/shared/client/features/auth/use-practice';
import { BottomBar } from './bottom-bar';
import { KeyList } from './key-list';
import { placesFor } from './places';
import { Rail } from './rail';
import { useShellKeys } from './use-shell-keys';

export function Shell({ user, children }: { user: SessionUser; children: ReactNode }) {
  const { colors } = useTheme();
  const { isWide } = useLayout();
  const { data: practice } = useQuery(practiceQuery());
  const [isKeyListOpen, setIsKeyListOpen] = useState(false);
  useShellKeys(() => setIsKeyListOpen(true));
  const places = placesFor(user.roles);
  return (
    <View style={{ flex: 1, flexDirection: isWide ? 'row' : 'column', backgroundColor: colors.paper }}>
      {isWide ? (
        <Rail
          user={user}
          places={places}
          practiceName={practice?.name}
          onShowKeys={() => setIsKeyListOpen(true)}
        />
      ) : null}
      <View style={{ flex: 1, minWidth: 0, minHeight: 0 }}>
        <View role="main" style={{ flex: 1, minHeight: 0 }}>
          {children}
        </View>
      </View>
      {isWide ? null : <BottomBar user={user} places={places} />}
      <KeyList isOpen={isKeyListOpen} onClose={() => setIsKeyListOpen(false)} />
    </View>
  );
}
