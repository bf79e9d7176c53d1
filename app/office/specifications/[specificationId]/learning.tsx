import { useLocalSearchParams } from 'expo-router';
import { View } from 'react-native';
import { ComparisonTable } from '#components/specifications/comparison-table.tsx';
import { ChangeTables, DecisionTable, WorkingTable } from '#components/specifications/correction-tables.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { Text } from '#components/ui/text.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCorrection, useDecideCorrection } from '#hooks/specifications.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { CorrectionProposal } from '#shared/contracts/specifications.ts';
import { formatCount, formatDay } from '#shared/domain/words.ts';

const WORKING =
  'What the specification says counts as much as six sides, and as many more as it has learned from. So four sides move it by 4 of 10 of the difference, thirty by 30 of 36. What was weighed is first brought to the weight foreseen for its side, so that a heavy side teaches nothing about shares; then the whole is brought back to 100 %.';

export default function LearningScreen() {
  const { specificationId } = useLocalSearchParams<{ specificationId: string }>();
  const correction = useCorrection(specificationId);
  useTitle('What your own weights propose');
  return (
    <StateView
      query={correction}
      what="the proposal"
      waiting={<Skeleton shape="rows" count={5} />}
      missing={{ title: 'No such specification', words: 'Look for it in the list of specifications.' }}
    >
      {(proposal) => <Ready proposal={proposal} />}
    </StateView>
  );
}

function Ready({ proposal }: { proposal: CorrectionProposal }) {
  const decide = useDecideCorrection();
  const { key, specificationId, name, edition, sides } = proposal;
  const answer = (decision: 'accepted' | 'rejected') => {
    if (key !== null) decide.mutate({ params: { specificationId }, body: { key, decision } });
  };
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        back={{ href: `/office/specifications/${specificationId}`, label: `${name}, edition ${edition}` }}
        title="What your own weights propose"
        above={`${name} · from ${formatCount(sides.length, 'side')}`}
      />
      {decide.data ? <Decided {...decide.data} /> : null}
      <ProblemNotice error={decide.error} title="Nothing was decided." />
      {key === null ? (
        <EmptyState
          title="Nothing to decide"
          words="Once a cutting day of this specification is closed, what was weighed on it is held against what was foreseen."
        />
      ) : (
        <>
          <Proposed proposal={proposal} />
          <View style={css('w-buttons')}>
            <Button
              label={`Accept as edition ${edition + 1}`}
              busy={decide.isPending}
              onPress={() => answer('accepted')}
            />
            <Button kind="quiet" label="Reject" busy={decide.isPending} onPress={() => answer('rejected')} />
          </View>
        </>
      )}
      <Skipped skipped={proposal.skipped} />
      <View style={css('w-stack')}>
        <Heading level={2}>Decided before</Heading>
        <DecisionTable decided={proposal.decided} />
      </View>
    </View>
  );
}

function Decided({ decision, resultEdition }: { decision: string; resultEdition: number | null }) {
  return (
    <Notice
      kind="good"
      spoken
      title={decision === 'accepted' ? `Accepted: edition ${resultEdition} has these shares.` : 'Rejected.'}
      kept="These sides are not proposed again. Cutting days keep the edition that they have."
    />
  );
}

function Proposed({ proposal }: { proposal: CorrectionProposal }) {
  const { sides, caution, cuts, changes, rows } = proposal;
  const days = [...new Set(sides.map(({ day }) => day))];
  return (
    <View style={css('w-stack-l')}>
      <Text measure>{`From ${formatCount(sides.length, 'side')} cut on ${days.map(formatDay).join(', ')}.`}</Text>
      {caution ? <Notice kind="held" title={caution} /> : null}
      <ComparisonTable caption="Foreseen by this edition, and weighed" cuts={cuts} />
      <View style={css('w-stack')}>
        <Heading level={2}>Shares that would change</Heading>
        <ChangeTables changes={changes} />
      </View>
      <Disclosure words="How the proposal is reached" ruled>
        <View style={css('w-stack')}>
          <Text measure>{WORKING}</Text>
          <WorkingTable rows={rows} />
        </View>
      </Disclosure>
    </View>
  );
}

function Skipped({ skipped }: Pick<CorrectionProposal, 'skipped'>) {
  if (skipped.length === 0) return null;
  return (
    <Notice kind="info" title={`${formatCount(skipped.length, 'carcase')} could not be counted.`}>
      <View style={css('w-stack-s')}>
        {skipped.map(({ earTag, day, reason }) => (
          <Text key={`${earTag} ${day}`} size="small">{`${earTag}, ${formatDay(day)}: ${reason}`}</Text>
        ))}
      </View>
    </Notice>
  );
}
