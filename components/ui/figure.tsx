import { Text } from 'react-native';
import { css } from '#components/theme/css.ts';

/** A number that counts: boxes on offer, animals hanging. Money has `Money`. */
export function Figure({ children, large = false }: { children: string | number; large?: boolean }) {
  return <Text style={css('t-price', large && 't-price-large')}>{children}</Text>;
}
