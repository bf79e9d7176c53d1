import { usePathname } from 'expo-router';
import type { ReactNode } from 'react';
import { View } from 'react-native';
import type { ShopHome } from '#shared/contracts/shop.ts';
import { css } from '#components/theme/css.ts';
import { ShopFoot } from '#components/ui/shop-foot.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { FARM_MARK, footPlaces } from './places.ts';
import { sellerWords } from './seller-words.ts';

type ShopPageProps = {
  farm: ShopHome['farm'] | null;
  /** Forms and single things read better in a narrow column. */
  narrow?: boolean;
  children: ReactNode;
};

/** What stands under the head of a shop page: its content, and the foot with the farm's address. */
export function ShopPage({ farm, narrow = false, children }: ShopPageProps) {
  const path = usePathname();
  return (
    <>
      <View role="main" id="main" tabIndex={-1} style={css('w-page', narrow && 'w-page-narrow', 'w-main')}>
        {children}
      </View>
      <ShopFoot path={path} links={footPlaces}>
        <Text weight="bold">{farm?.name ?? FARM_MARK}</Text>
        {farm ? (
          <>
            <Text size="small" tone="quiet">
              {sellerWords(farm)}
            </Text>
            <TextLink href={`tel:${farm.phone.replace(/\s/g, '')}`} tone="ink" place="alone" outside>
              {farm.phone}
            </TextLink>
            <TextLink href={`mailto:${farm.email}`} tone="ink" place="alone" outside>
              {farm.email}
            </TextLink>
          </>
        ) : null}
      </ShopFoot>
    </>
  );
}
