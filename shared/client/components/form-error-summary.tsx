/** One summary at the head of a form after a failed try: what is wrong, field by field, read out once. */
import { View } from 'react-native';
import { Card } from './card';
import { Mark } from './mark';
import { Text } from './text';

export function FormErrors({ messages }: { messages: readonly string[] }) {
  if (messages.length === 0) return null;
  return (
    <Card tone="stop" label="What needs correcting">
      <View role="alert" style={{ gap: 4 }}>
        <Mark
          tone="stop"
          label={
            messages.length === 1 ? 'One thing needs correcting' : `${messages.length} things need correcting`
          }
        />
        {messages.map((message) => (
          <Text key={message}>{`▪ ${message}`}</Text>
        ))}
      </View>
    </Card>
  );
}
