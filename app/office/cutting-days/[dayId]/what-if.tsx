import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { JobPanel } from '#components/allocation/job-panel.tsx';
import { OutcomeTable } from '#components/allocation/outcome-table.tsx';
import { TimeLimit } from '#components/allocation/time-limit.tsx';
import { WhatIfForm } from '#components/allocation/what-if-form.tsx';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAllocation } from '#hooks/allocation.ts';
import { useBoxKinds } from '#hooks/office.ts';
import { useWhatIf } from '#hooks/plan-jobs.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import { USUAL_SECONDS } from '#hooks/use-workbench.ts';
import type { Lock } from '#shared/contracts/allocation.ts';
import type { BoxKind, Cut } from '#shared/contracts/office.ts';
import type { WhatIf } from '#shared/contracts/plan-jobs.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).planJobs.WhatIf;

export default function WhatIfScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const allocation = useAllocation(dayId);
  const products = useBoxKinds();
  useTitle('What if');
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title="What if …"
        lead="Suppose something were different and see both answers side by side. Nothing is saved, and nothing on sale changes."
      />
      <DayPlaces dayId={dayId} role="owner" path={`/office/cutting-days/${dayId}/what-if`} />
      <StateView
        query={allocation}
        what="the plan of this day"
        missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
      >
        {({ latest }) => (
          <StateView query={products} what="boxes and cuts">
            {({ boxKinds, cuts }) => (
              <Suppose
                dayId={dayId}
                locks={latest?.locks ?? []}
                kinds={boxKinds.filter(({ isActive }) => isActive)}
                cuts={cuts.filter(({ isSoldLoose }) => isSoldLoose)}
              />
            )}
          </StateView>
        )}
      </StateView>
    </View>
  );
}

type SupposeProps = { dayId: string; locks: Lock[]; kinds: readonly BoxKind[]; cuts: readonly Cut[] };

function Suppose({ dayId, locks, kinds, cuts }: SupposeProps) {
  const whatIf = useWhatIf();
  const [seconds, setSeconds] = useState<number>(USUAL_SECONDS);
  const form = useContractForm<WhatIf>(loadSchema, {
    boxes: kinds.map(({ id, pricePence, demandBoxes }) => ({ boxKindId: id, pricePence, demandBoxes })),
    cuts: cuts.map(({ id, tenthPencePerKg, looseDemandPacks }) => ({ cutId: id, tenthPencePerKg, looseDemandPacks })),
    hangingDays: null,
    moreCarcases: 0,
  });
  const submit = sendForm(form, (supposed) => {
    whatIf.start({ params: { dayId }, body: { locks, timeLimitSeconds: seconds, whatIf: supposed } });
    return Promise.resolve();
  });
  const outcomes = whatIf.job?.outcomes;
  return (
    <>
      <WhatIfForm control={form.control} boxes={kinds} cuts={cuts} onSubmit={submit} busy={whatIf.isWorking} />
      <TimeLimit seconds={seconds} onChange={setSeconds} />
      <JobPanel {...whatIf} onCancel={whatIf.cancel} />
      {outcomes && !whatIf.isWorking ? (
        <View role="region" aria-label="Both answers" aria-live="polite" style={css('w-stack')}>
          <Heading level={2}>Both answers</Heading>
          <OutcomeTable {...outcomes} />
        </View>
      ) : null}
    </>
  );
}
