import { Text } from '#components/ui/text.tsx';
import { sumWords } from './specification-sums.ts';

type SumLineProps = { name: string; sumPpht: number; expectedPpht: number };

/** Follows what is typed, and is spoken when it changes. */
export function SumLine({ name, sumPpht, expectedPpht }: SumLineProps) {
  const isRight = sumPpht === expectedPpht;
  return (
    <Text live="status" weight="strong" tone={isRight ? 'good' : 'danger'} figures>
      {`${name} ${sumWords(sumPpht, expectedPpht)}.`}
    </Text>
  );
}
