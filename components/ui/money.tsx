import { Text as NativeText } from 'react-native';
import { css } from '#components/theme/css.ts';
import { formatMoney } from '#shared/domain/words.ts';
import { Text, type TextProps } from './text.tsx';

type MoneyProps = Omit<TextProps, 'children' | 'figures' | 'nowrap'> & {
  pence: number;
  /** A price as it hangs over the counter, in the letter of the headings. */
  look?: 'text' | 'price' | 'price-large';
};

export function Money({ pence, look = 'text', ...text }: MoneyProps) {
  if (look === 'text') {
    return (
      <Text {...text} figures nowrap>
        {formatMoney(pence)}
      </Text>
    );
  }
  return (
    <NativeText style={css('t-price', look === 'price-large' && 't-price-large')}>{formatMoney(pence)}</NativeText>
  );
}
