import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { MailState } from '#components/ui/mail-state.tsx';
import { Text } from '#components/ui/text.tsx';
import type { CollectionMail } from '#shared/contracts/packs.ts';
import { formatDayTime, formatTime } from '#shared/domain/words.ts';

type CollectionMailListProps = {
  mails: readonly CollectionMail[];
  chosen: ReadonlySet<string>;
  onChoose: (orderId: string, isChosen: boolean) => void;
  onPreview: (mail: CollectionMail) => void;
  onResend: (mailId: string) => void;
  /** The mail that is just being put into the queue again. */
  resendingId: string | undefined;
};

/** One row an order: whether its mail may go, and what became of it. */
export function CollectionMailList(props: CollectionMailListProps) {
  return (
    <View role="list" style={css('w-rows')}>
      {props.mails.map((mail) => (
        <View key={mail.orderId} role="listitem" style={css('w-stack-s')}>
          <View style={css('w-row-between')}>
            <View style={css('w-grow-wide')}>
              <Choice mail={mail} {...props} />
            </View>
            <View style={css('w-row')}>
              {mail.mail ? <MailState state={mail.mail.state} /> : <Waiting holdBack={mail.holdBack} />}
              <Button
                kind="quiet"
                small
                label="Preview"
                name={`Preview the mail of order ${mail.orderNo}`}
                onPress={() => props.onPreview(mail)}
              />
              <Resend mail={mail} {...props} />
            </View>
          </View>
          {mail.mail?.lastError ? <Text tone="danger">{mail.mail.lastError}</Text> : null}
        </View>
      ))}
    </View>
  );
}

type RowProps = CollectionMailListProps & { mail: CollectionMail };

function Choice({ mail, chosen, onChoose }: RowProps) {
  const label = `${mail.orderNo} ${mail.name}`;
  const note = `${mail.pointName}, ${formatDayTime(mail.startsAt)} to ${formatTime(mail.endsAt)} · ${mail.email}`;
  if (mail.mail) {
    return (
      <View style={css('w-stack-s')}>
        <Text weight="strong">{label}</Text>
        <Text size="small" tone="quiet">
          {note}
        </Text>
      </View>
    );
  }
  return (
    <Checkbox
      label={label}
      note={mail.holdBack ? `${note}. Held back: ${mail.holdBack}` : note}
      checked={chosen.has(mail.orderId)}
      disabled={mail.holdBack !== null}
      onChange={(isChosen) => onChoose(mail.orderId, isChosen)}
    />
  );
}

function Waiting({ holdBack }: { holdBack: string | null }) {
  return <Badge kind={holdBack === null ? 'quiet' : 'held'}>{holdBack === null ? 'to confirm' : 'held back'}</Badge>;
}

function Resend({ mail, onResend, resendingId }: RowProps) {
  const sent = mail.mail;
  if (!sent || sent.state === 'queued') return null;
  return (
    <Button
      kind="quiet"
      small
      label="Send again"
      name={`Send again to ${mail.name}`}
      busy={resendingId === sent.id}
      onPress={() => onResend(sent.id)}
    />
  );
}
