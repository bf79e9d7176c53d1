import { useId, useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Text } from '#components/ui/text.tsx';
import { holds, layOutRail, type RailGeometry, type RailPrimal } from './rail-geometry.ts';
import { RailLegend } from './rail-legend.tsx';
import { RailLine } from './rail-line.tsx';
import { RailNamed } from './rail-named.tsx';
import { RailTable } from './rail-table.tsx';
import type { RailMode } from './rail-words.ts';

type RailProps = {
  /** In carcase order, as the specification has them. */
  primals: readonly RailPrimal[];
  /** The same kilograms in 8 or 9 merged primals (`mergePrimals`), drawn where the rail is under 420 px wide. */
  narrowPrimals?: readonly RailPrimal[] | undefined;
  /** Names the rail for screen readers; printed under it with `captionShown`. */
  caption: string;
  captionShown?: boolean;
  mode?: RailMode;
  /** Kilograms that the full width stands for. Rails of one stack share it, so that their areas compare. */
  scaleGrams?: number | undefined;
  height?: 'slim' | 'tall';
  legend?: boolean;
  /** Off where the screen itself tells about the chosen primal, so that stacked rails stay where they are. */
  naming?: boolean;
  selectedId?: string | undefined;
  onSelect?: ((id: string) => void) | undefined;
};

export function Rail(props: RailProps) {
  const {
    primals,
    narrowPrimals,
    caption,
    mode = 'sales',
    height = 'tall',
    legend = true,
    naming = true,
    onSelect,
  } = props;
  const id = useId();
  const [namedId, setNamedId] = useState<string>();
  const chosenId = props.selectedId ?? namedId;
  const geometry = layOutRail(primals, props.scaleGrams);
  const narrow = narrowPrimals && layOutRail(narrowPrimals, props.scaleGrams);
  const choose = (primalId: string) => {
    setNamedId(primalId);
    onSelect?.(primalId);
  };
  const line = { mode, chosenId, onChoose: choose };
  return (
    <View style={css('rail', height === 'tall' && 'rail-tall')}>
      <View role="group" aria-label={caption}>
        <RailLine {...line} id={`${id}w`} geometry={geometry} visibleWhen={narrow ? 'wide' : 'always'} />
        {narrow ? <RailLine {...line} id={`${id}n`} geometry={narrow} visibleWhen="narrow" /> : null}
      </View>
      {geometry.totalGrams === 0 ? <Text tone="quiet">Nothing hangs here yet.</Text> : null}
      {naming ? (
        <RailNamed
          columns={columnsWith(chosenId, geometry, narrow)}
          chosenId={chosenId}
          mode={mode}
          onChoose={choose}
        />
      ) : null}
      {legend ? <RailLegend mode={mode} held={mode === 'sales' || geometry.heldGrams > 0} /> : null}
      {props.captionShown ? (
        <Text size="small" tone="quiet">
          {caption}
        </Text>
      ) : null}
      <RailTable geometry={geometry} mode={mode} caption={caption} />
    </View>
  );
}

/** The line that the chosen primal hangs on: a merged one is only on the narrow line. */
function columnsWith(id: string | undefined, wide: RailGeometry, narrow: RailGeometry | undefined) {
  const onWide = wide.columns.some((column) => holds(column.primal, id));
  return onWide || !narrow ? wide.columns : narrow.columns;
}
