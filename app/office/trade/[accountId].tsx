import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { PriceForm, type PriceList } from '#components/trade/price-form.tsx';
import { productOptions } from '#components/trade/products.ts';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBoxKinds } from '#hooks/office.ts';
import { useSpecification, useSpecifications } from '#hooks/specifications.ts';
import { useSetTradePrices, useTradeAccounts } from '#hooks/trade.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { TradeAccount } from '#shared/contracts/trade.ts';

const loadPrices = async () => (await import('#hooks/form-schemas.ts')).trade.setTradePricesSchema.body;

export default function TradeAccountScreen() {
  const { accountId } = useLocalSearchParams<{ accountId: string }>();
  const accounts = useTradeAccounts();
  // Counts up to draw the form afresh, with the price list as it is now.
  const [round, setRound] = useState(0);
  return (
    <StateView query={accounts} what="this account">
      {(data) => {
        const account = data.accounts.find(({ id }) => id === accountId);
        if (!account) return <EmptyState level={1} title="No such account" words="Look for it in the trade list." />;
        return (
          <View style={css('w-stack-l')}>
            <TitleBar
              back={{ href: '/office/trade', label: 'Trade' }}
              title={account.businessName}
              above={`Price list · account ${account.state}`}
            />
            {round > 0 ? <Notice kind="good" spoken title="These are the prices now." /> : null}
            <Prices key={`${account.id} ${round}`} account={account} afresh={() => setRound(round + 1)} />
          </View>
        );
      }}
    </StateView>
  );
}

function Prices({ account, afresh }: { account: TradeAccount; afresh: () => void }) {
  const boxKinds = useBoxKinds();
  const specifications = useSpecifications();
  const specification = useSpecification(specifications.data?.specifications.at(-1)?.id);
  const setPrices = useSetTradePrices();
  const form = useContractForm<PriceList>(loadPrices, {
    version: account.version,
    prices: account.prices.map(({ product, tenthPencePerKg, basis }) => ({ product, tenthPencePerKg, basis })),
  });
  useTitle(account.businessName);
  const submit = sendForm(form, async (body) => {
    await setPrices.mutateAsync({ params: { accountId: account.id }, body });
    afresh();
  });
  return (
    <StateView query={boxKinds} what="the cuts">
      {({ cuts }) => (
        <StateView query={specification} what="the primals">
          {({ body }) => (
            <View style={css('w-stack')}>
              <PriceForm
                control={form.control}
                products={productOptions(body, cuts)}
                onSubmit={submit}
                busy={setPrices.isPending}
              />
              <ProblemNotice error={setPrices.error} title="The prices were not saved." onShowNewest={afresh} />
            </View>
          )}
        </StateView>
      )}
    </StateView>
  );
}
