import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';

const keeping = [
  'Fetch it in a cool bag and put it in a fridge at 5 °C or colder as soon as you are home. Every pack carries its weight and its use-by date.',
  'Freeze what you will not eat in time on the day you fetch it, never after its use-by date. Thaw it in the fridge, in a dish, and cook it within a day.',
  'Keep raw meat covered and below food that is ready to eat. Wash hands, boards and knives after it.',
];

// Food Standards Agency, advice to consumers on cooking and chilling: 70 °C in the middle for two minutes.
const cooking = [
  'Mince, burgers, and rolled or diced meat: cook right through, 70 °C in the middle for two minutes, no pink left.',
  'Whole steaks and unrolled joints may stay pink inside once every side of the outside is well browned.',
  'This is the usual advice of the Food Standards Agency. Take more care for small children, in pregnancy and in old age.',
];

/** What was fetched raw has to be kept and cooked: the usual advice, with its temperatures. */
export function KeepingAdvice() {
  return (
    <View style={css('w-columns')}>
      <Advice title="Keeping it" words={keeping} />
      <Advice title="Cooking it" words={cooking} />
    </View>
  );
}

function Advice({ title, words }: { title: string; words: readonly string[] }) {
  return (
    <View style={css('w-section')}>
      <Heading level={2}>{title}</Heading>
      <View style={css('w-prose')}>
        {words.map((sentence) => (
          <Text key={sentence}>{sentence}</Text>
        ))}
      </View>
    </View>
  );
}
