import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Table } from '#components/ui/table.tsx';
import { formatPercent } from '#shared/domain/words.ts';
import type { Primal, Quarter, Specification } from '#shared/engine/figures/specification.ts';
import { TISSUES } from '#shared/engine/figures/tissues.ts';
import { setQuarterShare, setTissue } from './edit-specification.ts';
import { ShareField } from './share-field.tsx';
import { sumOfQuarter, sumOfSide, totalOf, WHOLE_PPHT } from './specification-sums.ts';
import { SumLine } from './sum-line.tsx';

export type EditorProps = {
  draft: Specification;
  onEdit: (draft: Specification) => void;
  isReadOnly: boolean;
};

/** How the side parts into quarters. */
export function SideEditor({ draft, onEdit, isReadOnly }: EditorProps) {
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>The side</Heading>
      <View style={css('w-fields')}>
        {draft.quarters.map((quarter) => (
          <QuarterShare key={quarter.id} quarter={quarter} {...{ draft, onEdit, isReadOnly }} />
        ))}
      </View>
      <SumLine name="The side" sumPpht={sumOfSide(draft)} expectedPpht={WHOLE_PPHT} />
    </View>
  );
}

function QuarterShare({ quarter, draft, onEdit, isReadOnly }: EditorProps & { quarter: Quarter }) {
  return (
    <ShareField
      isCell={false}
      label={`${quarter.name}, share of the side`}
      ppht={quarter.sharePpht}
      isReadOnly={isReadOnly}
      onChange={(ppht) => onEdit(setQuarterShare(draft, quarter.id, ppht))}
    />
  );
}

/** Every primal of a quarter by its tissues, in per cent of the side. */
export function QuarterEditor({ quarter, ...editor }: EditorProps & { quarter: Quarter }) {
  const { draft, onEdit, isReadOnly } = editor;
  const sumOf = (tissue: (typeof TISSUES)[number]) =>
    quarter.primals.reduce((sum, { tissues }) => sum + tissues[tissue], 0);
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>{quarter.name}</Heading>
      <QuarterShare quarter={quarter} {...editor} />
      <Table
        caption={`Primals of the ${quarter.name.toLowerCase()}, in per cent of the side`}
        rows={quarter.primals}
        rowKey={({ id }) => id}
        columns={[
          { id: 'name', title: 'Primal', cell: ({ name }) => name, foot: 'Together' },
          ...TISSUES.map((tissue) => ({
            id: tissue,
            title: titleOf(tissue),
            cell: (primal: Primal) => (
              <ShareField
                label={`${primal.name}, ${tissue}`}
                ppht={primal.tissues[tissue]}
                isReadOnly={isReadOnly}
                onChange={(ppht) => onEdit(setTissue(draft, { primalId: primal.id, tissue }, ppht))}
              />
            ),
            foot: formatPercent(sumOf(tissue)),
          })),
          {
            id: 'total',
            title: 'Of the side',
            align: 'end',
            cell: ({ tissues }) => formatPercent(totalOf(tissues)),
            foot: formatPercent(sumOfQuarter(quarter)),
          },
        ]}
      />
      <SumLine name={quarter.name} sumPpht={sumOfQuarter(quarter)} expectedPpht={quarter.sharePpht} />
      <SumLine name="The side" sumPpht={sumOfSide(draft)} expectedPpht={WHOLE_PPHT} />
    </View>
  );
}

export function titleOf(tissue: string): string {
  return tissue === 'loss' ? 'Cutting loss' : tissue.charAt(0).toUpperCase() + tissue.slice(1);
}

/** One primal by itself, for a narrow screen. */
export function PrimalEditor({ quarter, primal, ...editor }: EditorProps & { quarter: Quarter; primal: Primal }) {
  const { draft, onEdit, isReadOnly } = editor;
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>{primal.name}</Heading>
      <View style={css('w-fields')}>
        {TISSUES.map((tissue) => (
          <ShareField
            key={tissue}
            isCell={false}
            label={`${primal.name}, ${tissue}`}
            ppht={primal.tissues[tissue]}
            isReadOnly={isReadOnly}
            onChange={(ppht) => onEdit(setTissue(draft, { primalId: primal.id, tissue }, ppht))}
          />
        ))}
      </View>
      <SumLine name={primal.name} sumPpht={totalOf(primal.tissues)} expectedPpht={totalOf(primal.tissues)} />
      <SumLine name={quarter.name} sumPpht={sumOfQuarter(quarter)} expectedPpht={quarter.sharePpht} />
      <SumLine name="The side" sumPpht={sumOfSide(draft)} expectedPpht={WHOLE_PPHT} />
    </View>
  );
}
