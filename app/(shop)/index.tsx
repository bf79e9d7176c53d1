import { useLoaderData } from 'expo-router';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { call } from '#hooks/api.ts';
import { getShopHome } from '#shared/contracts/shop.ts';

export async function loader() {
  return call(getShopHome, {});
}

export default function HomeScreen() {
  const home = useLoaderData<typeof loader>();
  return (
    <View role="main" style={css('w-page', 'w-main', 'w-stack')}>
      <Heading level={1}>{home.farm.name}</Heading>
    </View>
  );
}
