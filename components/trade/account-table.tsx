import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Badge } from '#components/ui/badge.tsx';
import { Button } from '#components/ui/button.tsx';
import { Table } from '#components/ui/table.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import type { TradeAccount } from '#shared/contracts/trade.ts';
import { formatCount } from '#shared/domain/words.ts';

const kinds = { applied: 'held', approved: 'free', refused: 'quiet' } as const;

type AccountTableProps = {
  accounts: readonly TradeAccount[];
  onDecide: (account: TradeAccount, state: 'approved' | 'refused') => void;
  /** The account whose decision is on its way. */
  decidingId: string | undefined;
};

export function AccountTable({ accounts, onDecide, decidingId }: AccountTableProps) {
  return (
    <Table
      caption="Trade accounts"
      rows={accounts}
      rowKey={(account) => account.id}
      empty="Nobody has applied yet."
      columns={[
        { id: 'name', title: 'Business', cell: (account) => account.businessName },
        { id: 'address', title: 'Address', cell: (account) => account.addressLines.join(', ') },
        { id: 'reach', title: 'Reach', cell: (account) => `${account.email}, ${account.phone}` },
        { id: 'state', title: 'State', cell: (account) => <Badge kind={kinds[account.state]}>{account.state}</Badge> },
        {
          id: 'prices',
          title: 'Prices',
          cell: (account) => (
            <TextLink href={`/office/trade/${account.id}`} name={`${priceWords(account)} of ${account.businessName}`}>
              {priceWords(account)}
            </TextLink>
          ),
        },
        {
          id: 'decide',
          title: 'Decide',
          cell: (account) => <Decide account={account} onDecide={onDecide} busy={decidingId === account.id} />,
        },
      ]}
    />
  );
}

function priceWords(account: TradeAccount): string {
  return account.prices.length === 0 ? 'No prices' : formatCount(account.prices.length, 'price');
}

type DecideProps = Pick<AccountTableProps, 'onDecide'> & { account: TradeAccount; busy: boolean };

function Decide({ account, onDecide, busy }: DecideProps) {
  const refusal = account.state === 'approved' ? 'Withdraw' : 'Refuse';
  return (
    <View style={css('w-row')}>
      {account.state === 'approved' ? null : (
        <Button
          kind="quiet"
          small
          label="Approve"
          name={`Approve ${account.businessName}`}
          busy={busy}
          onPress={() => onDecide(account, 'approved')}
        />
      )}
      {account.state === 'refused' ? null : (
        <Button
          kind="quiet"
          small
          label={refusal}
          name={`${refusal} ${account.businessName}`}
          busy={busy}
          onPress={() => onDecide(account, 'refused')}
        />
      )}
    </View>
  );
}
