import { useState } from 'react';
import { View } from 'react-native';
import { CustomerSettingsForm } from '#components/customers/customer-settings-form.tsx';
import { FeedbackList } from '#components/customers/feedback-list.tsx';
import { WaitingTable } from '#components/customers/waiting-table.tsx';
import { css } from '#components/theme/css.ts';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCustomers, useEditCustomerSettings } from '#hooks/customers.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { CustomerSettings } from '#shared/contracts/customers.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).customers.CustomerSettings;

export default function CustomersScreen() {
  const customers = useCustomers();
  // Counts up to draw the form afresh, with the settings as they are now.
  const [round, setRound] = useState(0);
  useTitle('Customers');
  return (
    <StateView query={customers} what="the customers" waiting={<Skeleton shape="rows" count={5} />}>
      {({ settings, feedback, waiting }) => (
        <View style={css('w-stack-l')}>
          <TitleBar title="Customers" above="What they say, wait for and agree to" />
          <View style={css('w-stack')}>
            <Heading level={2}>Feedback</Heading>
            <FeedbackList {...feedback} />
          </View>
          <View style={css('w-stack')}>
            <Heading level={2}>Waiting list</Heading>
            <WaitingTable boxes={waiting} />
          </View>
          {round > 0 ? <Notice kind="good" spoken title="Saved, in force from today on." /> : null}
          <Edit key={round} settings={settings} onSaved={() => setRound(round + 1)} />
        </View>
      )}
    </StateView>
  );
}

function Edit({ settings, onSaved }: { settings: CustomerSettings; onSaved: () => void }) {
  const edit = useEditCustomerSettings();
  const form = useContractForm<CustomerSettings>(loadSchema, settings);
  const submit = sendForm(form, async (body) => {
    await edit.mutateAsync(body);
    onSaved();
  });
  return (
    <View style={css('w-stack')}>
      <CustomerSettingsForm control={form.control} onSubmit={submit} busy={edit.isPending} />
      <ProblemNotice error={edit.error} title="Nothing was saved." />
    </View>
  );
}
