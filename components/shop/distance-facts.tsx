import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';

/** What has to be known before meat is bought at a distance. */
export function DistanceFacts({ seller }: { seller: string | undefined }) {
  return (
    <View style={css('w-section')}>
      <Heading level={2}>Before you buy</Heading>
      <DefinitionList
        ruled
        facts
        items={[
          { term: 'What it is', value: 'Raw beef, chilled, and nothing else' },
          { term: 'Its weight', value: 'On every pack; the price here is the most you pay' },
          { term: 'Its origin', value: 'Born, reared, slaughtered and cut: on the label and by its code' },
          ...(seller ? [{ term: 'Sold by', value: seller }] : []),
        ]}
      />
      <Text tone="quiet" measure>
        Fresh meat spoils quickly, so the fourteen days to send back what was bought online do not apply to it. Until
        the cut-off you can cancel here without a reason, and all of your money goes back.
      </Text>
    </View>
  );
}
