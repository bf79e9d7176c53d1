import { Button } from '#components/ui/button.tsx';
import { MailState } from '#components/ui/mail-state.tsx';
import { Table } from '#components/ui/table.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Mail } from '#shared/contracts/packs.ts';
import { formatDayTime } from '#shared/domain/words.ts';

type OutboxTableProps = { mails: readonly Mail[]; onResend: (mailId: string) => void; resendingId: string | undefined };

/** Every mail that the farm sent or tried to send. */
export function OutboxTable({ mails, onResend, resendingId }: OutboxTableProps) {
  return (
    <Table
      caption="E-mail"
      rows={mails}
      rowKey={(mail) => mail.id}
      empty="No such mail."
      columns={[
        { id: 'subject', title: 'Subject', cell: (mail) => mail.subject },
        { id: 'to', title: 'To', cell: (mail) => mail.to },
        { id: 'when', title: 'When', cell: (mail) => formatDayTime(mail.sentAt ?? mail.createdAt) },
        { id: 'state', title: 'State', cell: (mail) => <MailState state={mail.state} /> },
        {
          id: 'tries',
          title: 'Tries',
          align: 'end',
          cell: (mail) => (
            <>
              {mail.attempts}
              {mail.lastError ? (
                <Text size="small" tone="danger">
                  {` ${mail.lastError}`}
                </Text>
              ) : null}
            </>
          ),
        },
        {
          id: 'again',
          title: 'Again',
          cell: (mail) =>
            mail.state === 'queued' ? (
              'on its way'
            ) : (
              <Button
                kind="quiet"
                small
                label="Send again"
                name={`Send again ${mail.subject} to ${mail.to}`}
                busy={resendingId === mail.id}
                onPress={() => onResend(mail.id)}
              />
            ),
        },
      ]}
    />
  );
}
