import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { ApplyForm, type Application } from '#components/trade/apply-form.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useApplyForTrade, useTradeAccount } from '#hooks/trade.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { TradeAccount } from '#shared/contracts/trade.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).trade.applyForTradeSchema.body;

const states = {
  applied: { kind: 'held', words: 'The farm looks at your application and writes to you. You can still correct it.' },
  approved: { kind: 'good', words: 'Your account is approved: the coming carcases are open to you.' },
  refused: { kind: 'error', words: 'The farm did not approve your account. You can correct it and apply again.' },
} as const;

export default function ApplyScreen() {
  const account = useTradeAccount();
  // Counts up to draw the form afresh after it was sent.
  const [round, setRound] = useState(0);
  useTitle('Trade account');
  return (
    <StateView query={account} what="your trade account">
      {(data) => (
        <View style={css('w-stack-l', 't-measure')}>
          <TitleBar
            title="Trade account"
            lead="For butchers and kitchens who buy by the side, quarter, primal or cut."
          />
          {data.account ? (
            <Notice
              kind={states[data.account.state].kind}
              spoken={round > 0}
              title={`${data.account.businessName}: ${data.account.state}`}
              kept={states[data.account.state].words}
            >
              {data.account.state === 'approved' ? (
                <TextLink href="/trade/carcases" place="alone" icon="forward">
                  Coming carcases
                </TextLink>
              ) : null}
            </Notice>
          ) : null}
          {data.account?.state === 'approved' ? null : (
            <Apply key={round} account={data.account} onSent={() => setRound(round + 1)} />
          )}
        </View>
      )}
    </StateView>
  );
}

function Apply({ account, onSent }: { account: TradeAccount | null; onSent: () => void }) {
  const apply = useApplyForTrade();
  const form = useContractForm<Application>(loadSchema, {
    businessName: account?.businessName ?? '',
    addressLines: account?.addressLines ?? [],
    phone: account?.phone ?? '',
  });
  const submit = sendForm(form, async (body) => {
    await apply.mutateAsync({ body });
    onSent();
  });
  return (
    <View style={css('w-stack')}>
      <Text size="small" tone="quiet">
        Supply to shops goes through approved premises unless an exemption applies; your local authority says which.
      </Text>
      <ApplyForm
        control={form.control}
        onSubmit={submit}
        busy={apply.isPending}
        submitLabel={account ? 'Send the correction' : 'Apply'}
      />
      <ProblemNotice error={apply.error} title="The application was not sent." />
    </View>
  );
}
