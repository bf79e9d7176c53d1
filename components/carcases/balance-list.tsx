import { DefinitionList } from '#components/ui/definition-list.tsx';
import type { CutoutNode } from '#shared/contracts/carcases.ts';
import { formatGrams } from '#shared/domain/words.ts';
import { balanceOf } from './mass-balance.ts';

const words = { cut: 'Cuts', trim: 'Trim', bone: 'Bone', fat: 'Fat', loss: 'Cutting loss', whole: 'Whole' } as const;

/** What goes in equals what comes out, shown to the gram. */
export function BalanceList({ nodes }: { nodes: readonly CutoutNode[] }) {
  const { wholeGrams, parts, differenceGrams } = balanceOf(nodes);
  return (
    <DefinitionList
      items={[
        { term: 'On the hook', value: formatGrams(wholeGrams), strong: true },
        ...parts.map((part) => ({ term: words[part.kind], value: formatGrams(part.grams) })),
        {
          term: 'Difference',
          value: formatGrams(differenceGrams),
          note: differenceGrams === 0 ? 'Every gram has its place.' : 'What the scales disagree by.',
          strong: true,
        },
      ]}
    />
  );
}
