import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';

export default function NotFound() {
  return (
    <View role="main" style={css('w-page', 'w-page-narrow', 'w-main', 'w-stack')}>
      <Heading level={1}>There is no such page</Heading>
      <Text>The address may have been typed wrongly, or what it led to is gone.</Text>
      <TextLink href="/">Back to the shop</TextLink>
    </View>
  );
}
