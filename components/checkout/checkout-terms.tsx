import { View } from 'react-native';
import type { PricedLine } from '#shared/contracts/orders.ts';
import type { CuttingDaySummary } from '#shared/contracts/shop.ts';
import { formatDay, formatDayTime, formatMoney, formatWeight } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';

type CheckoutTermsProps = {
  day: CuttingDaySummary;
  lines: readonly PricedLine[];
  discountPence: number;
  /** Null while it is not known whether the van comes. */
  deliveryPence: number | null;
  totalPence: number;
};

/** What is bought, for how much, and on which terms: read before paying. */
export function CheckoutTerms({ day, lines, discountPence, deliveryPence, totalPence }: CheckoutTermsProps) {
  return (
    <View style={css('w-section')}>
      <View style={css('w-row-between')}>
        <Heading level={2}>{`For ${formatDay(day.day)}`}</Heading>
        <TextLink href="/basket" place="alone" name="Change the basket">
          Change
        </TextLink>
      </View>
      <DefinitionList
        ruled
        items={[
          ...lines.map((line) => ({
            term: `${line.quantity} × ${line.name}`,
            note: `${line.kind === 'box' ? 'at least' : 'up to'} ${formatWeight(line.unitGrams)}${line.quantity > 1 ? ' each' : ''}`,
            value: formatMoney(line.linePence),
          })),
          ...(discountPence > 0 ? [{ term: 'Your code', value: formatMoney(-discountPence) }] : []),
          ...(deliveryPence === null ? [] : [{ term: 'Delivery', value: formatMoney(deliveryPence) }]),
          { term: 'Total', value: formatMoney(totalPence), strong: true },
        ]}
      />
    </View>
  );
}

/** What the button agrees to. */
export function TermsWords({ day, restPence }: { day: CuttingDaySummary; restPence: number }) {
  return (
    <View style={css('w-stack-s')}>
      <Text size="small" tone="quiet">
        {`You pay on the next page, by card. You can change or cancel until ${formatDayTime(day.cutOffAt)} and get all of your money back; after that the meat is cut for you.`}
      </Text>
      {restPence > 0 ? (
        <Text size="small" tone="quiet">
          {`The rest, at most ${formatMoney(restPence)}, is taken from the same card once your order is packed and weighed; lighter packs make it less. If the card refuses, you get a link to pay by e-mail.`}
        </Text>
      ) : null}
      <Text size="small" tone="quiet">
        Fresh meat spoils quickly, so the fourteen days to send back what was bought online do not apply. A box that
        weighs less than promised and a loose pack lighter than its price are paid back by themselves.
      </Text>
    </View>
  );
}
