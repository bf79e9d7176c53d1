import { View } from 'react-native';
import type { Box } from '#shared/contracts/shop.ts';
import { css } from '#components/theme/css.ts';
import { CutDrawing, drawingOf } from '#components/ui/cut-drawing.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { Text } from '#components/ui/text.tsx';
import { Weight } from '#components/ui/weight.tsx';

/** What is inside, as ranges: no two sides are the same, the guaranteed weight always is. */
export function BoxContents({ lines }: { lines: Box['lines'] }) {
  return (
    <View style={css('w-stack-s')}>
      <SmallCaps level={2}>Inside</SmallCaps>
      <View role="list" style={css('w-inside')}>
        {lines.map((line) => (
          <View role="listitem" key={line.name} style={css('w-inside-line')}>
            <CutDrawing kind={drawingOf(line.cooking)} size={52} />
            <View style={css('w-inside-words')}>
              <Text weight="bold">{line.name}</Text>
              <Text size="small" tone="quiet">
                {eitherOf(line.cuts)}
              </Text>
            </View>
            <Weight grams={line.minGrams} toGrams={line.maxGrams} size="lead" />
          </View>
        ))}
      </View>
    </View>
  );
}

/** `sirloin, rump or rib-eye`: which of them depends on how the side is cut. */
function eitherOf(cuts: readonly string[]): string {
  const names = cuts.map((cut) => cut.charAt(0).toLowerCase() + cut.slice(1));
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} or ${names[names.length - 1]}`;
}
