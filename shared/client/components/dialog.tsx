/**
 * A question that must be answered first. Focus is kept inside, Escape closes, focus returns to the opener
 * (react-native-web's Modal does that); the first focus goes to the least dangerous action.
 */
import { useId, useRef } from 'react';
import type { ReactNode } from 'react';
import { Modal, ScrollView, View } from 'react-native';
import { useLayout, useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SPACE } from '@/shared/client/theme/tokens';
import { Button } from './button';
import { Text } from './text';

interface DialogProps {
  title: string;
  isOpen: boolean;
  onClose: () => void;
  children: ReactNode;
  /** Buttons besides "Cancel". */
  actions?: ReactNode;
  cancelLabel?: string;
}

export function Dialog({ title, isOpen, onClose, children, actions, cancelLabel = 'Cancel' }: DialogProps) {
  const { colors } = useTheme();
  const { isPhone } = useLayout();
  const titleId = useId();
  const cancel = useRef<View>(null);
  // Not before the modal shows: it first notes where the focus came from, to give it back there.
  const focusCancel = () => (cancel.current as { focus?: () => void } | null)?.focus?.();
  return (
    <Modal
      visible={isOpen}
      transparent
      animationType="none"
      onRequestClose={onClose}
      onShow={focusCancel}
      {...({ 'aria-labelledby': titleId } as object)}
    >
      <View
        style={{
          flex: 1,
          backgroundColor: 'rgba(10, 20, 26, 0.55)',
          justifyContent: isPhone ? 'flex-end' : 'center',
          alignItems: 'center',
        }}
      >
        <View
          style={{
            backgroundColor: colors.surface,
            width: '100%',
            maxWidth: isPhone ? undefined : 620,
            maxHeight: '92%',
            borderRadius: RADIUS,
            padding: SPACE.l,
            gap: SPACE.l,
          }}
        >
          <Text variant="title" level={2} id={titleId}>
            {title}
          </Text>
          <ScrollView
            style={{ flexShrink: 1 }}
            contentContainerStyle={{ gap: SPACE.m, padding: 4 }}
            tabIndex={-1}
          >
            {children}
          </ScrollView>
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.m, justifyContent: 'flex-end' }}>
            <Button ref={cancel} label={cancelLabel} onPress={onClose} />
            {actions}
          </View>
        </View>
      </View>
    </Modal>
  );
}
