/** Mails kept by the local stand-in of the mail service, when no real one is set. */
import { useQuery } from '@tanstack/react-query';
import { asProblem } from '@/shared/client/api/problem';
import { Card } from '@/shared/client/components/card';
import { Screen } from '@/shared/client/components/screen';
import { EmptyState, ErrorPanel, Loading } from '@/shared/client/components/states';
import { Facts } from '@/shared/client/components/table';
import { MailText } from './mail-text';
import { formatInstant } from '@/shared/client/lib/format';
import { outboxQuery } from './use-accounts';

export function OutboxScreen() {
  const outbox = useQuery(outboxQuery());
  return (
    <Screen
      title="Outbox"
      width="reading"
      lead="Without a mail service, mails stay here instead of leaving the house."
    >
      {outbox.isPending ? <Loading /> : null}
      {outbox.error ? (
        <ErrorPanel problem={asProblem(outbox.error)} onRetry={() => void outbox.refetch()} />
      ) : null}
      {outbox.data?.items.length === 0 ? (
        <EmptyState
          title="No mails yet"
          hint="Invite somebody, or ask for a new password: the mail will appear here."
        />
      ) : null}
      {outbox.data?.items.map((mail) => (
        <Card key={mail.id} title={mail.subject}>
          <Facts
            items={[
              { label: 'To', value: mail.to },
              { label: 'Sent', value: formatInstant(mail.sentAt) },
            ]}
          />
          <MailText text={mail.text} />
        </Card>
      ))}
    </Screen>
  );
}
