import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Table } from '#components/ui/table.tsx';
import type { Pack } from '#shared/contracts/packs.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { formatDay, formatGrams } from '#shared/domain/words.ts';

/** The last packs are the ones in hand; the others are shown when asked for. */
const LAST = 12;

/** Where a pack is when no order has it. */
const PLACES: Record<string, string> = {
  chiller: 'in the chiller',
  freezer: 'in the freezer',
  carcase: 'never was',
  waste: 'thrown away',
  'own use': 'kept for own use',
};

/** What has left the farm, or was booked out, stays as it is. */
const CHANGEABLE = new Set(['chiller', 'order']);

export function PackList({ packs, onOpen }: { packs: readonly Pack[]; onOpen: (pack: Pack) => void }) {
  const [isAll, setAll] = useState(false);
  const newestFirst = packs.toReversed();
  const shown = isAll ? newestFirst : newestFirst.slice(0, LAST);
  return (
    <View style={css('w-stack')}>
      <Table
        caption="Packs"
        rows={shown}
        rowKey={(pack) => pack.id}
        empty="No pack is weighed yet."
        columns={[
          { id: 'code', title: 'Pack', cell: (pack) => pack.code },
          { id: 'cut', title: 'Cut', cell: (pack) => pack.cut },
          { id: 'from', title: 'From', cell: (pack) => shortEarTag(pack.earTag) },
          { id: 'grams', title: 'Weight', align: 'end', cell: (pack) => formatGrams(pack.grams) },
          { id: 'use', title: 'Use by', cell: (pack) => formatDay(pack.useBy) },
          { id: 'place', title: 'Where', cell: placeOf },
          {
            id: 'change',
            title: 'Change',
            cell: (pack) =>
              CHANGEABLE.has(pack.place) ? (
                <Button
                  kind="quiet"
                  small
                  label="Change"
                  name={`Change pack ${pack.code}`}
                  onPress={() => onOpen(pack)}
                />
              ) : (
                '–'
              ),
          },
        ]}
      />
      {shown.length < packs.length ? (
        <View style={css('w-buttons')}>
          <Button kind="quiet" label={`Show all ${packs.length} packs`} onPress={() => setAll(true)} />
        </View>
      ) : null}
    </View>
  );
}

function placeOf(pack: Pack): string {
  return pack.orderNo === null ? (PLACES[pack.place] ?? pack.place) : `order ${pack.orderNo}, ${pack.orderName ?? ''}`;
}
