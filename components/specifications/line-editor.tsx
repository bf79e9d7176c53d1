import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { SmallCaps } from '#components/ui/small-caps.tsx';
import { formatPercent } from '#shared/domain/words.ts';
import type { Choice, Specification, Way, WayLine } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';
import { setTake } from './edit-specification.ts';
import type { EditorProps } from './quarter-editor.tsx';
import { ShareField } from './share-field.tsx';
import { sumOfTakes, WHOLE_PPHT } from './specification-sums.ts';
import { TreeNode } from './specification-tree.tsx';
import { SumLine } from './sum-line.tsx';

const LINE_NAMES: Readonly<Record<string, string>> = { bone: 'Bone', fat: 'Fat', loss: 'Cutting loss' };

export function nameOfLine(draft: Specification, lineId: string): string {
  return LINE_NAMES[lineId] ?? draft.cuts.find(({ id }) => id === lineId)?.name ?? lineId;
}

export function nameOfPrimal(draft: Specification, primalId: string): string {
  const primals = draft.quarters.flatMap((quarter) => quarter.primals);
  return primals.find(({ id }) => id === primalId)?.name ?? primalId;
}

type LineListProps = { draft: Specification; choice: Choice; way: Way; onLine: (lineId: string) => void };

/** The lines of a way by what they take of the meat, and whether each tissue is given away to the last part. */
export function LineList({ draft, choice, way, onLine }: LineListProps) {
  const meatOf = ({ takes }: WayLine) => {
    const parts = takes.filter(({ meat }) => meat > 0);
    return parts.length === 0 ? 'no meat' : parts.map(({ meat }) => formatPercent(meat)).join(' and ');
  };
  return (
    <View style={css('w-stack')}>
      <div className="w-tree">
        {way.lines.map((line) => (
          <TreeNode
            key={line.id}
            name={nameOfLine(draft, line.id)}
            figure={meatOf(line)}
            isWrong={false}
            onPress={() => onLine(line.id)}
          />
        ))}
      </div>
      {choice.primalIds.map((primalId) => (
        <Sums key={primalId} draft={draft} way={way} primalId={primalId} />
      ))}
    </View>
  );
}

/** What the lines take together of each tissue of one primal. */
function Sums({ draft, way, primalId }: { draft: Specification; way: Way; primalId: string }) {
  return (
    <View style={css('w-stack-s')}>
      <SmallCaps>{`All lines of the ${nameOfPrimal(draft, primalId).toLowerCase()}`}</SmallCaps>
      {TISSUES.map((tissue) => (
        <SumLine
          key={tissue}
          name={`Its ${tissue}`}
          sumPpht={sumOfTakes(way, primalId, tissue)}
          expectedPpht={WHOLE_PPHT}
        />
      ))}
    </View>
  );
}

type LineEditorProps = EditorProps & { choice: Choice; way: Way; line: WayLine };

/** What one line takes of each primal that its way covers. */
export function LineEditor({ choice, way, line, draft, onEdit, isReadOnly }: LineEditorProps) {
  const name = nameOfLine(draft, line.id);
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>{`${name}, ${way.name.toLowerCase()}`}</Heading>
      {choice.primalIds.map((primalId) => (
        <View key={primalId} style={css('w-stack')}>
          <View style={css('w-fields')}>
            {TISSUES.map((tissue) => (
              <ShareField
                key={tissue}
                isCell={false}
                label={`${name}, of the ${tissue} of ${nameOfPrimal(draft, primalId)}`}
                ppht={line.takes.find((take) => take.primalId === primalId)?.[tissue] ?? 0}
                isReadOnly={isReadOnly}
                onChange={(ppht) =>
                  onEdit(
                    setTake(draft, { choiceId: choice.id, wayId: way.id, lineId: line.id, primalId, tissue }, ppht),
                  )
                }
              />
            ))}
          </View>
          <Sums draft={draft} way={way} primalId={primalId} />
        </View>
      ))}
    </View>
  );
}
