/** A place to drop a file, and the button that opens the system's file dialog. */
import { useState } from 'react';
import { View } from 'react-native';
import * as DocumentPicker from 'expo-document-picker';
import { useTheme } from '@/shared/client/theme/theme-context';
import { RADIUS, SPACE } from '@/shared/client/theme/tokens';
import { Button } from './button';
import { Text } from './text';

interface FileDropProps {
  label: string;
  hint: string;
  onFile: (file: File) => void;
  isBusy?: boolean;
}

export function FileDrop({ label, hint, onFile, isBusy = false }: FileDropProps) {
  const { colors } = useTheme();
  const [isOver, setIsOver] = useState(false);
  const pick = async () => {
    const result = await DocumentPicker.getDocumentAsync({
      type: ['text/csv', 'text/plain', 'text/tab-separated-values', '*/*'],
    });
    const file = result.assets?.[0]?.file;
    if (file) onFile(file);
  };
  const dropHandlers = {
    onDragOver: (event: DragEvent) => {
      event.preventDefault();
      setIsOver(true);
    },
    onDragLeave: () => setIsOver(false),
    onDrop: (event: DragEvent) => {
      event.preventDefault();
      setIsOver(false);
      const file = event.dataTransfer?.files[0];
      if (file && !isBusy) onFile(file);
    },
  };
  return (
    <View
      {...(dropHandlers as object)}
      style={{
        borderWidth: 2,
        borderStyle: 'dashed',
        borderColor: isOver ? colors.sea : colors.line,
        backgroundColor: colors.surface,
        borderRadius: RADIUS,
        padding: SPACE.xl,
        gap: SPACE.m,
        alignItems: 'flex-start',
      }}
    >
      <Text variant="heading">{isOver ? 'Let go to check this file' : label}</Text>
      <Text color="ink2">{hint}</Text>
      <Button label="Choose a file" kind="primary" isBusy={isBusy} onPress={() => void pick()} />
    </View>
  );
}
