import { formatGrams, formatWeight } from '#shared/domain/words.ts';
import { Text, type TextProps } from './text.tsx';

type WeightProps = Omit<TextProps, 'children' | 'figures' | 'nowrap'> & {
  grams: number;
  /** An upper end makes it a range: `0.8–1.0 kg`. */
  toGrams?: number;
  /** Every gram, for scales and ledgers. */
  exact?: boolean;
};

export function Weight({ grams, toGrams, exact = false, ...look }: WeightProps) {
  return (
    <Text {...look} figures nowrap>
      {toGrams === undefined || toGrams === grams ? say(grams, exact) : range(grams, toGrams, exact)}
    </Text>
  );
}

function say(grams: number, exact: boolean): string {
  return exact ? formatGrams(grams) : formatWeight(grams);
}

/** The unit is said once when both ends share it: `500–900 g`, but `650 g–1.2 kg`. */
function range(from: number, to: number, exact: boolean): string {
  const [low, high] = [say(from, exact), say(to, exact)];
  const [figure, unit] = low.split(' ');
  return unit && high.endsWith(` ${unit}`) ? `${figure}–${high}` : `${low}–${high}`;
}
