import { Link } from 'expo-router';
import type { GenerateMetadataFunction } from 'expo-server';
import { View } from 'react-native';
import { FARM_MARK } from '#components/shop/places.ts';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { pageMetadata } from '#hooks/page-metadata.ts';

export const generateMetadata: GenerateMetadataFunction = (request) =>
  pageMetadata(request, { title: 'There is no such page · Skelderwick Farm', hidden: true });

/** Any address that leads nowhere. */
export default function NotFoundScreen() {
  return (
    <View style={css('w-shell')}>
      <View role="banner" style={css('w-page', 'w-head')}>
        <Link href="/" style={css('t-mark', 'w-mark')}>
          {FARM_MARK}
        </Link>
      </View>
      <View role="main" id="main" style={css('w-page', 'w-main')}>
        <EmptyState
          level={1}
          title="There is no such page"
          words="The address may have been typed wrongly, or what it led to has been sold through."
        >
          <ButtonLink href="/" label="To the shop" />
        </EmptyState>
      </View>
    </View>
  );
}
