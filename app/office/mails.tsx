import { useState } from 'react';
import { View } from 'react-native';
import { OutboxTable } from '#components/office/outbox-table.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Select } from '#components/ui/select.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useMails, useResendMail } from '#hooks/collections.ts';
import { useTitle } from '#hooks/use-title.ts';
import { formatCount } from '#shared/domain/words.ts';

const states = ['', 'queued', 'sent', 'failed', 'bounced'].map((value) => ({ value, label: value || 'all' }));

export default function MailsScreen() {
  const mails = useMails();
  const resend = useResendMail();
  const [state, setState] = useState('');
  useTitle('E-mail');
  return (
    <StateView query={mails} what="the e-mails" waiting={<Skeleton shape="rows" count={6} />}>
      {(data) => {
        const stuck = data.mails.filter((mail) => mail.state === 'failed' || mail.state === 'bounced').length;
        const shown = data.mails.filter((mail) => state === '' || mail.state === state);
        return (
          <View style={css('w-stack-l')}>
            <TitleBar
              title="E-mail"
              above={stuck > 0 ? `${formatCount(stuck, 'mail')} did not arrive` : 'Nothing is stuck'}
            />
            <ProblemNotice error={resend.error} title="The mail was not sent again." />
            {data.mails.length === 0 ? (
              <EmptyState
                title="No mail yet"
                words="Confirmations and collection mails are listed here as they go out."
              />
            ) : (
              <>
                <Select label="Show" width="short" value={state} options={states} onChange={setState} />
                <OutboxTable
                  mails={shown}
                  onResend={(mailId) => resend.mutate(mailId)}
                  resendingId={resend.isPending ? resend.variables : undefined}
                />
              </>
            )}
          </View>
        );
      }}
    </StateView>
  );
}
