import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Checkbox } from '#components/ui/checkbox.tsx';
import { Field } from '#components/ui/field.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { NumberField } from '#components/ui/number-field.tsx';
import { Select } from '#components/ui/select.tsx';
import { Table } from '#components/ui/table.tsx';
import type { SpecificationFault } from '#shared/engine/figures/check-specification.ts';
import type { Choice, Tissue, Way, WayLine } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';
import { addLine, cutsToAdd, editWay, removeLine, setTake } from './edit-specification.ts';
import { FaultList } from './fault-list.tsx';
import { LineList, nameOfLine, nameOfPrimal } from './line-editor.tsx';
import { titleOf, type EditorProps } from './quarter-editor.tsx';
import { ShareField } from './share-field.tsx';
import { sumOfTakes, sumWords, WHOLE_PPHT } from './specification-sums.ts';

type WayEditorProps = EditorProps & {
  choice: Choice;
  way: Way;
  /** What is wrong with this way. */
  faults: readonly SpecificationFault[];
  /** On a phone each line has a page of its own. */
  onLine?: ((lineId: string) => void) | undefined;
  onCopy: () => void;
  /** Absent where it is the last way of its choice. */
  onRemove?: (() => void) | undefined;
};

/** One way of cutting: a table for each primal that it covers, its lines as shares of the primal's tissues. */
export function WayEditor({ choice, way, faults, onLine, onCopy, onRemove, ...editor }: WayEditorProps) {
  const { draft, isReadOnly } = editor;
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>{`${choice.name}: ${way.name}`}</Heading>
      <WayFields choice={choice} way={way} {...editor} />
      {onLine ? (
        <LineList draft={draft} choice={choice} way={way} onLine={onLine} />
      ) : (
        choice.primalIds.map((primalId) => (
          <PrimalShares key={primalId} primalId={primalId} {...{ choice, way, ...editor }} />
        ))
      )}
      <FaultList faults={faults} />
      {isReadOnly ? null : <Lines choice={choice} way={way} {...editor} />}
      {isReadOnly ? null : (
        <View style={css('w-buttons')}>
          <Button kind="quiet" label="Copy this way" onPress={onCopy} />
          {onRemove ? <Button kind="danger" label="Take this way out" onPress={onRemove} /> : null}
        </View>
      )}
    </View>
  );
}

type WayProps = EditorProps & { choice: Choice; way: Way };

function WayFields({ choice, way, draft, onEdit, isReadOnly }: WayProps) {
  const place = { choiceId: choice.id, wayId: way.id };
  return (
    <View style={css('w-fields')}>
      <Field
        label="Name of this way"
        value={way.name}
        maxLength={80}
        readOnly={isReadOnly}
        onChangeText={(name) => onEdit(editWay(draft, place, { name }))}
      />
      <NumberField
        label="Extra work at the block"
        unit="poundsPerKg"
        value={way.extraTenthPencePerKg}
        readOnly={isReadOnly}
        onChange={(rate) =>
          onEdit(editWay(draft, place, { extraTenthPencePerKg: rate === null || !(rate >= 0) ? 0 : rate }))
        }
      />
      <Checkbox
        label="Vertebral column stays in"
        note="Closed for carcases over thirty months."
        checked={way.keepsVertebrae}
        disabled={isReadOnly}
        onChange={(keepsVertebrae) => onEdit(editWay(draft, place, { keepsVertebrae }))}
      />
    </View>
  );
}

function PrimalShares({ primalId, choice, way, draft, onEdit, isReadOnly }: WayProps & { primalId: string }) {
  const primalName = nameOfPrimal(draft, primalId);
  const nameOf = (id: string) => nameOfLine(draft, id);
  const shareOf = (line: WayLine, tissue: Tissue) =>
    line.takes.find((take) => take.primalId === primalId)?.[tissue] ?? 0;
  return (
    <Table
      caption={`What becomes of the ${primalName.toLowerCase()}, in per cent of each tissue`}
      captionShown
      rows={way.lines}
      rowKey={({ id }) => id}
      columns={[
        { id: 'line', title: 'Line', cell: ({ id }) => nameOf(id), foot: 'Together' },
        ...TISSUES.map((tissue) => {
          const sum = sumOfTakes(way, primalId, tissue);
          return {
            id: tissue,
            title: titleOf(tissue),
            cell: (line: WayLine) => (
              <ShareField
                label={`${nameOf(line.id)}, of the ${tissue} of ${primalName}`}
                ppht={shareOf(line, tissue)}
                isReadOnly={isReadOnly}
                onChange={(ppht) =>
                  onEdit(
                    setTake(draft, { choiceId: choice.id, wayId: way.id, lineId: line.id, primalId, tissue }, ppht),
                  )
                }
              />
            ),
            foot: (
              <span role="status" className={sum === WHOLE_PPHT ? 't-good' : 'w-tree-wrong'}>
                {sumWords(sum, WHOLE_PPHT)}
              </span>
            ),
          };
        }),
      ]}
    />
  );
}

function Lines({ choice, way, draft, onEdit }: WayProps) {
  const place = { choiceId: choice.id, wayId: way.id };
  const products = way.lines.filter(({ kind }) => kind === 'cut' || kind === 'trim');
  return (
    <View style={css('w-fields')}>
      <Select
        label="Give another cut"
        optional
        value=""
        placeholder="Choose a cut"
        options={cutsToAdd(draft, way).map(({ id, name }) => ({ value: id, label: name }))}
        onChange={(cutId) => onEdit(addLine(draft, place, cutId))}
      />
      <Select
        label="Take a cut out"
        hint="Its shares are then missing: give them to another line."
        optional
        value=""
        placeholder="Choose a cut"
        options={products.map(({ id }) => ({ value: id, label: nameOfLine(draft, id) }))}
        onChange={(lineId) => onEdit(removeLine(draft, place, lineId))}
      />
    </View>
  );
}
