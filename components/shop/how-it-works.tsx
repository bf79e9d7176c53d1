import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { StepDrawing, type StepDrawingKind } from './step-drawing.tsx';

const steps: { drawing: StepDrawingKind; title: string; words: string }[] = [
  {
    drawing: 'choose',
    title: 'Choose while it hangs',
    words:
      'Before anything is sold we work out what each side will give. What you see as left can be yours: it is kept for you from the moment you go to pay.',
  },
  {
    drawing: 'cut',
    title: 'We cut once, for you',
    words:
      'On the cutting day every pack is weighed. A box never weighs less than it says, and a loose pack that is lighter than its price is paid back.',
  },
  {
    drawing: 'collect',
    title: 'Collect at your time',
    words: 'You choose the place and the time when you order. Bring a cool bag and keep the meat cold on the way home.',
  },
];

export function HowItWorks() {
  return (
    <View style={css('w-section')}>
      <Heading level={2}>How it works</Heading>
      <ol className="w-steps">
        {steps.map((step) => (
          <li className="w-step" key={step.title}>
            <StepDrawing kind={step.drawing} />
            <View style={css('w-step-words')}>
              <Heading level={3}>{step.title}</Heading>
              <Text tone="quiet">{step.words}</Text>
            </View>
          </li>
        ))}
      </ol>
    </View>
  );
}
