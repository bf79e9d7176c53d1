import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import type { CarcaseMargin, DayMargin, Deadweight } from '#shared/contracts/margin.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { formatGrams, formatMoney, formatRate } from '#shared/domain/words.ts';
import { MarginSum } from './margin-sum.tsx';
import { signedRate } from './margin-words.ts';

/** Each carcase with its three figures; folds open to every step behind them. */
export function CarcaseMargins({ carcases, grid }: Pick<DayMargin, 'carcases' | 'grid'>) {
  return (
    <View style={css('w-stack-l')}>
      {carcases.map((carcase) => (
        <View key={carcase.carcaseId} style={css('w-stack-s')}>
          <Heading level={3}>{nameCarcase(carcase)}</Heading>
          {carcase.problem ? (
            <Notice
              kind="held"
              title={carcase.problem}
              next="Until then it counts as worth nothing deadweight, and the gain is too high."
            />
          ) : null}
          <DefinitionList
            items={[
              { term: 'Contribution', value: formatMoney(carcase.margin.contributionPence) },
              { term: 'Deadweight value', value: formatMoney(carcase.margin.deadweightPence) },
              {
                term: 'Gain',
                value: formatMoney(carcase.margin.gainPence),
                note: `${formatRate(carcase.margin.gainPerKg)} of cold deadweight`,
                strong: true,
              },
            ]}
          />
          <Disclosure words="The sum down to the gain">
            <MarginSum margin={carcase.margin} />
          </Disclosure>
          {carcase.deadweight ? (
            <Disclosure words="The deadweight value, step by step">
              <DeadweightSteps deadweight={carcase.deadweight} gridName={`${grid.name}, edition ${grid.edition}`} />
            </Disclosure>
          ) : null}
        </View>
      ))}
    </View>
  );
}

export function nameCarcase({ title, earTag }: Pick<CarcaseMargin, 'title' | 'earTag'>): string {
  return `${title} ${shortEarTag(earTag)}`;
}

function DeadweightSteps({ deadweight, gridName }: { deadweight: Deadweight; gridName: string }) {
  const { conformation, fatClass, isGraded } = deadweight;
  const graded = isGraded ? 'from the kill sheet' : 'not graded yet: the specification’s reference class';
  return (
    <DefinitionList
      ruled
      items={[
        { term: 'Cold weight', value: formatGrams(deadweight.coldGrams) },
        { term: 'Base', value: formatRate(deadweight.baseTenthPencePerKg), note: gridName },
        { term: `Class ${conformation} ${fatClass}`, value: signedRate(deadweight.classAdjustment), note: graded },
        { term: 'Weight', value: signedRate(deadweight.weightAdjustment) },
        { term: 'Age', value: signedRate(deadweight.ageAdjustment) },
        { term: 'Price', value: formatRate(deadweight.tenthPencePerKg), strong: true },
        { term: 'Price × cold weight', value: formatMoney(deadweight.grossPence) },
        { term: 'Levy', value: `− ${formatMoney(deadweight.levyPence)}` },
        { term: 'Haulage', value: `− ${formatMoney(deadweight.haulagePence)}` },
        { term: 'Other deductions', value: `− ${formatMoney(deadweight.deductionsPence)}` },
        { term: 'Deadweight value', value: formatMoney(deadweight.netPence), strong: true },
      ]}
    />
  );
}
