import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { DefinitionList, type Definition } from '#components/ui/definition-list.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { SourceMark } from '#components/ui/source-mark.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Carcase } from '#shared/contracts/carcases.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { formatDay, formatGrams } from '#shared/domain/words.ts';

/** Each side as the kill sheet has it, where it says so. */
function sidesOf({ leftGrams, rightGrams }: Carcase): Definition[] {
  if (leftGrams === null || rightGrams === null) return [];
  return [{ term: 'Left and right on the sheet', value: `${formatGrams(leftGrams)} and ${formatGrams(rightGrams)}` }];
}

/** The chain from live weight to the hook, and what this carcase may not be cut into. */
export function CarcaseNotes({ carcase }: { carcase: Carcase }) {
  return (
    <View style={css('w-stack')}>
      <DefinitionList
        items={[
          { term: 'Ear tag', value: formatEarTag(carcase.earTag) },
          { term: 'Kill day', value: formatDay(carcase.killDay) },
          { term: 'Live weight', value: formatGrams(carcase.liveGrams) },
          { term: 'Hot weight', value: carcase.hotGrams === null ? 'not given' : formatGrams(carcase.hotGrams) },
          { term: 'Cold weight', value: formatGrams(carcase.coldGrams) },
          { term: 'Cold weight is', value: <SourceMark source={carcase.coldSource} /> },
          ...sidesOf(carcase),
          {
            term: 'After hanging',
            value: formatGrams(carcase.hungGrams),
            note: carcase.hungSource === 'weighed' ? 'Weighed.' : 'By the curve of common practice.',
          },
        ]}
      />
      {carcase.closedWays.length > 0 ? (
        <Notice kind="held" title="Some ways are closed for this carcase.">
          <View style={css('w-stack-s')}>
            {carcase.closedWays.map(({ choice, way, reason }) => (
              <Text key={`${choice} ${way}`} size="small">{`${choice}, ${way}: ${reason}`}</Text>
            ))}
          </View>
        </Notice>
      ) : null}
      {carcase.isGraded ? null : (
        <Notice
          kind="info"
          title="No class on the kill sheet yet."
          kept="The class of the specification stands in, so the estimates are wider."
        />
      )}
      {carcase.clamps.map((sentence) => (
        <Notice key={sentence} kind="info" title="Outside the range of the source." kept={sentence} />
      ))}
    </View>
  );
}
