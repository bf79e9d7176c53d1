import { useLocalSearchParams, useRouter } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { ListWaiting } from '#components/shop/list-waiting.tsx';
import { ShopPage } from '#components/shop/shop-page.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useBalance, useOtherCard, usePayBalance, type Balance } from '#hooks/balance.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { usePageReturn } from '#hooks/use-page-return.ts';
import { useTitle } from '#hooks/use-title.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';

const TITLE = 'Pay the rest · Skelderwick Farm';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: TITLE, hidden: true });

/** The only page on which the payment company's own script runs: here a bank may ask who pays. */
export default function PayScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const balance = useBalance(token);
  useTitle(TITLE);
  const isNothingOpen = balance.error instanceof AppError && balance.error.code === 'STATE_CHANGED';
  return (
    <ShopPage farm={null} narrow>
      {isNothingOpen ? (
        <EmptyState level={1} title="Nothing is left to pay" words="This order is paid up, or it was cancelled.">
          <ButtonLink href={`/orders/${token}`} label="See the order" />
        </EmptyState>
      ) : (
        <StateView
          query={balance}
          what="what is still to be paid"
          waiting={<ListWaiting title="Pay the rest" rows={2} />}
          missing={{ title: 'There is no such order', words: 'Please open the link from your mail once more.' }}
        >
          {(data) => <Pay token={token} balance={data} />}
        </StateView>
      )}
    </ShopPage>
  );
}

function Pay({ token, balance }: { token: string; balance: Balance }) {
  const router = useRouter();
  const pay = usePayBalance(token);
  const other = useOtherCard(token);
  usePageReturn(other.reset);
  const amount = formatMoney(balance.amountPence);
  const error = pay.error ?? other.error;
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        above={`Order ${balance.orderNo}`}
        title={`${amount} to pay`}
        lead="Your order is packed. Its rest could not be taken from the card that you paid the deposit with."
      />
      {error ? <Notice kind="error" title={error.message} /> : null}
      <View style={css('w-stack')}>
        {balance.hasCard ? (
          <>
            <Text tone="quiet">
              With the same card, your bank may ask you here whether it is you. Pressing the button charges it.
            </Text>
            <Button
              wide
              label={`Pay ${amount} with the same card`}
              busy={pay.isPending || pay.isSuccess}
              busyLabel="Paying …"
              onPress={() => pay.mutate(balance, { onSuccess: () => router.replace(`/orders/${token}?from=paid`) })}
            />
          </>
        ) : null}
        <Button
          wide
          kind="quiet"
          label="Use another card"
          busy={other.isPending || other.isSuccess}
          onPress={() => other.mutate(undefined, { onSuccess: ({ paymentUrl }) => window.location.assign(paymentUrl) })}
        />
      </View>
    </View>
  );
}
