import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { BarChart } from '#components/margin/bar-chart.tsx';
import { CarcaseMargins, nameCarcase } from '#components/margin/carcase-margins.tsx';
import { BoxPriceTable, JointCostTable } from '#components/margin/joint-costs.tsx';
import { MarginSum } from '#components/margin/margin-sum.tsx';
import { MarginTable } from '#components/margin/margin-table.tsx';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { ChipGroup } from '#components/ui/chip-group.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useDayMargin } from '#hooks/margin.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Basis, DayMargin } from '#shared/contracts/margin.ts';
import { formatDay, formatDayWithYear, formatMoney, formatRate } from '#shared/domain/words.ts';

const SHARING =
  'Its part of kill, inspection, levy, haulage, butchery and deadweight value is shared within each carcase by net realisable value, to the penny; its cold weight by the grams of product.';

export default function MarginScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const [basis, setBasis] = useState<Basis>('planned');
  const query = useDayMargin(dayId, basis);
  const path = `/office/cutting-days/${dayId}/margin`;
  return (
    <StateView
      query={query}
      what="the margin"
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {({ margin }) => (
        <View style={css('w-stack-l')}>
          <TitleBar
            title="Margin"
            above={margin ? `Cutting day ${formatDay(margin.day)}` : undefined}
            lead={margin?.restsOn}
          />
          <DayPlaces dayId={dayId} role="owner" path={path} />
          <ChipGroup
            label="Reckoned on"
            value={basis}
            chips={[
              { value: 'planned', label: 'The plan' },
              { value: 'sold', label: 'What is sold' },
            ]}
            onChange={(value) => setBasis(value === 'sold' ? 'sold' : 'planned')}
          />
          {margin ? <Margins margin={margin} /> : <NothingPlanned dayId={dayId} />}
        </View>
      )}
    </StateView>
  );
}

function NothingPlanned({ dayId }: { dayId: string }) {
  return (
    <EmptyState
      title="Nothing is planned yet"
      words="Work the allocation out first: the margin reckons what its plan brings against selling the carcases deadweight."
    >
      <ButtonLink href={`/office/cutting-days/${dayId}/allocation`} label="To the allocation" />
    </EmptyState>
  );
}

function Margins({ margin }: { margin: DayMargin }) {
  useTitle(`Margin ${formatDay(margin.day)}`);
  const { whole, grid } = margin;
  return (
    <>
      <View style={css('w-columns')}>
        <View style={css('w-stack')}>
          <Heading level={2}>The cutting day</Heading>
          <MarginSum margin={whole} />
        </View>
        <BarChart
          title="Contribution and deadweight value by carcase"
          axis="Pounds per kg of cold deadweight"
          series={['contribution', 'deadweight value']}
          tickWords={(tenths) => formatMoney(tenths / 10)}
          groups={margin.carcases.map((carcase) => ({
            id: carcase.carcaseId,
            name: nameCarcase(carcase),
            bars: [
              { value: carcase.margin.contributionPerKg, words: formatRate(carcase.margin.contributionPerKg) },
              { value: carcase.margin.deadweightPerKg, words: formatRate(carcase.margin.deadweightPerKg) },
            ],
          }))}
        />
      </View>
      <View style={css('w-stack')}>
        <Text measure>
          {`Deadweight value by ${grid.name}, edition ${grid.edition}, in force from ${formatDayWithYear(grid.validFrom)}. ${grid.source}`}
        </Text>
        <TextLink href="/office/price-grid" place="alone">
          Price grid
        </TextLink>
      </View>
      <Heading level={2}>By carcase</Heading>
      <CarcaseMargins carcases={margin.carcases} grid={grid} />
      <Heading level={2}>By channel</Heading>
      <MarginTable caption="Margin by channel" what="Channel" rows={margin.byChannel} sharing={SHARING} />
      <Heading level={2}>By box</Heading>
      <MarginTable caption="Margin by kind of box" what="Box" rows={margin.byBox} sharing={SHARING} />
      <BoxPriceTable boxes={margin.boxes} cardFee={margin.cardFee} />
      <Heading level={2}>By cut</Heading>
      <Disclosure words={`Margin of ${margin.byCut.length} cuts`} ruled>
        <MarginTable caption="Margin by cut" what="Cut" rows={margin.byCut} sharing={SHARING} />
      </Disclosure>
      <Disclosure words="The joint cost and who carries it" ruled>
        <JointCostTable joint={margin.joint} />
      </Disclosure>
    </>
  );
}
