import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';

/** Stays at the foot of a long list once something was taken from it. */
export function BasketBar({ count }: { count: number }) {
  if (count === 0) return null;
  return (
    <View style={css('w-stick')}>
      <ButtonLink wide href="/basket" label={`Go to basket · ${count}`} icon="forward" />
    </View>
  );
}
