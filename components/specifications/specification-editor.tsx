import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { useBreakpoint } from '#components/theme/use-breakpoint.ts';
import { Button } from '#components/ui/button.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Text } from '#components/ui/text.tsx';
import { formatCount, formatPercent } from '#shared/domain/words.ts';
import type { SpecificationFault } from '#shared/engine/figures/check-specification.ts';
import type { Specification } from '#shared/engine/figures/specification.ts';
import { copyWay, removeWay } from './edit-specification.ts';
import { FaultList } from './fault-list.tsx';
import { LineEditor } from './line-editor.tsx';
import { PrimalEditor, QuarterEditor, SideEditor, type EditorProps } from './quarter-editor.tsx';
import { isWrongAt, placeOfFault, totalOf, type Place } from './specification-sums.ts';
import { SpecificationTree, TreeNode } from './specification-tree.tsx';
import { WayEditor } from './way-editor.tsx';

type SpecificationEditorProps = EditorProps & { faults: readonly SpecificationFault[] };

/** The tree beside what is chosen in it; on a phone one after the other. */
export function SpecificationEditor(props: SpecificationEditorProps) {
  const { draft, faults } = props;
  const isNarrow = useBreakpoint() === 'narrow';
  const [chosen, setChosen] = useState<Place>();
  const place = chosen ?? (isNarrow ? undefined : ({ kind: 'quarter', id: 'fore' } as const));
  const tree = <SpecificationTree draft={draft} faults={faults} place={place} onGo={setChosen} />;
  return (
    <View style={css('w-stack')}>
      <Text live="status" weight="strong" tone={faults.length === 0 ? 'good' : 'danger'}>
        {faults.length === 0
          ? 'Everything adds up to 100 %.'
          : `${formatCount(faults.length, 'thing')} ${faults.length === 1 ? 'does' : 'do'} not add up yet.`}
      </Text>
      <FaultList faults={faults} onGo={(fault) => setChosen(placeOfFault(draft, fault))} />
      {isNarrow && place ? (
        <View style={css('w-stack')}>
          <View style={css('w-buttons')}>
            <Button
              kind="quiet"
              small
              icon="back"
              label={backWords(place)}
              onPress={() => setChosen(placeAbove(place, draft))}
            />
          </View>
          <Chosen {...props} place={place} onGo={setChosen} isNarrow />
        </View>
      ) : null}
      {isNarrow && !place ? tree : null}
      {!isNarrow && place ? (
        <View style={css('w-columns-tree')}>
          {tree}
          <Chosen {...props} place={place} onGo={setChosen} isNarrow={false} />
        </View>
      ) : null}
    </View>
  );
}

function placeAbove(place: Place, draft: Specification): Place | undefined {
  if (place.kind === 'line') return { kind: 'way', choiceId: place.choiceId, id: place.wayId };
  if (place.kind === 'way') return { kind: 'choice', id: place.choiceId };
  if (place.kind !== 'primal') return undefined;
  const quarter = draft.quarters.find(({ primals }) => primals.some(({ id }) => id === place.id));
  return quarter && { kind: 'quarter', id: quarter.id };
}

function backWords(place: Place): string {
  if (place.kind === 'line') return 'The whole way';
  if (place.kind === 'way') return 'All ways of this choice';
  return place.kind === 'primal' ? 'The whole quarter' : 'The whole side';
}

type ChosenProps = SpecificationEditorProps & { place: Place; onGo: (place: Place) => void; isNarrow: boolean };

function Chosen(props: ChosenProps) {
  const { place, draft, isNarrow, onGo } = props;
  if (place.kind === 'side') return <SideEditor {...props} />;
  if (place.kind === 'choice') return <ChoiceWays {...props} choiceId={place.id} />;
  if (place.kind === 'way') return <ChosenWay {...props} choiceId={place.choiceId} wayId={place.id} />;
  if (place.kind === 'line')
    return <ChosenWay {...props} choiceId={place.choiceId} wayId={place.wayId} lineId={place.id} />;
  const quarter = draft.quarters.find(({ id, primals }) =>
    place.kind === 'quarter' ? id === place.id : primals.some((primal) => primal.id === place.id),
  );
  if (!quarter) return null;
  if (place.kind === 'primal') {
    const primal = quarter.primals.find(({ id }) => id === place.id);
    return primal ? <PrimalEditor key={primal.id} {...props} quarter={quarter} primal={primal} /> : null;
  }
  if (!isNarrow) return <QuarterEditor key={quarter.id} {...props} quarter={quarter} />;
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>{quarter.name}</Heading>
      <div className="w-tree">
        {quarter.primals.map(({ id, name, tissues }) => (
          <TreeNode
            key={id}
            name={name}
            figure={formatPercent(totalOf(tissues))}
            isWrong={false}
            onPress={() => onGo({ kind: 'primal', id })}
          />
        ))}
      </div>
    </View>
  );
}

function ChoiceWays({ draft, faults, onGo, choiceId }: ChosenProps & { choiceId: string }) {
  const choice = draft.choices.find(({ id }) => id === choiceId);
  if (!choice) return null;
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>{`Ways of ${choice.name.toLowerCase()}`}</Heading>
      <Text tone="quiet">The first way that is open is taken where nothing else was chosen.</Text>
      <div className="w-tree">
        {choice.ways.map((way) => (
          <TreeNode
            key={way.id}
            name={way.name}
            isWrong={isWrongAt({ kind: 'way', choiceId, id: way.id }, draft, faults)}
            onPress={() => onGo({ kind: 'way', choiceId, id: way.id })}
          />
        ))}
      </div>
    </View>
  );
}

type ChosenWayProps = ChosenProps & { choiceId: string; wayId: string; lineId?: string };

function ChosenWay({ choiceId, wayId, lineId, ...props }: ChosenWayProps) {
  const { draft, faults, onEdit, onGo, isReadOnly, isNarrow } = props;
  const choice = draft.choices.find(({ id }) => id === choiceId);
  const way = choice?.ways.find(({ id }) => id === wayId);
  if (!choice || !way) return null;
  const line = way.lines.find(({ id }) => id === lineId);
  if (isNarrow && line) return <LineEditor key={lineId} {...{ draft, onEdit, isReadOnly, choice, way, line }} />;
  const copy = () => {
    const made = copyWay(draft, { choiceId, wayId });
    if (!made) return;
    onEdit(made.draft);
    onGo({ kind: 'way', choiceId, id: made.wayId });
  };
  const remove = () => {
    onEdit(removeWay(draft, { choiceId, wayId }));
    onGo({ kind: 'choice', id: choiceId });
  };
  return (
    <WayEditor
      key={`${choiceId} ${wayId}`}
      draft={draft}
      onEdit={onEdit}
      isReadOnly={isReadOnly}
      choice={choice}
      way={way}
      faults={faults.filter(({ node }) => node === `${choiceId}/${wayId}` || node.startsWith(`${choiceId}/${wayId}/`))}
      onLine={isNarrow ? (id) => onGo({ kind: 'line', choiceId, wayId, id }) : undefined}
      onCopy={copy}
      onRemove={choice.ways.length > 1 ? remove : undefined}
    />
  );
}
