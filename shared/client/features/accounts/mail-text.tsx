/** A mail's words; addresses of this site become links. */
import type { Href } from 'expo-router';
import { Link } from '@/shared/client/components/link';
import { Text } from '@/shared/client/components/text';
import { Stack } from '@/shared/client/components/card';

export function MailText({ text }: { text: string }) {
  return (
    <Stack gap={4}>
      {text.split(/\r?\n/).map((line, index) => {
        const path = /^https?:\/\/[^/\s]+(\/\S*)$/.exec(line.trim())?.[1];
        return path ? (
          <Link key={index} href={path as Href} label={line.trim()} />
        ) : (
          <Text key={index}>{line || ' '}</Text>
        );
      })}
    </Stack>
  );
}
