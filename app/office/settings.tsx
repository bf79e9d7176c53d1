import { useState } from 'react';
import { View } from 'react-native';
import { SettingsForm } from '#components/office/settings-form.tsx';
import { css } from '#components/theme/css.ts';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useEditSettings, useSettings } from '#hooks/office.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Settings } from '#shared/contracts/office.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).office.Settings;

export default function SettingsScreen() {
  const settings = useSettings();
  // Counts up to draw the form afresh, with the settings as they are now.
  const [round, setRound] = useState(0);
  useTitle('Settings');
  return (
    <StateView query={settings} what="the settings">
      {(data) => (
        <View style={css('w-stack-l')}>
          <TitleBar title="Settings" above="In force from today on" />
          {round > 0 ? (
            <Notice kind="good" spoken title="Saved." kept="Earlier cutting days keep what they had." />
          ) : null}
          <Edit key={round} settings={data} onSaved={() => setRound(round + 1)} />
        </View>
      )}
    </StateView>
  );
}

function Edit({ settings, onSaved }: { settings: Settings; onSaved: () => void }) {
  const edit = useEditSettings();
  const form = useContractForm<Settings>(loadSchema, settings);
  const submit = sendForm(form, async (body) => {
    await edit.mutateAsync(body);
    onSaved();
  });
  return (
    <View style={css('w-stack')}>
      <SettingsForm control={form.control} onSubmit={submit} busy={edit.isPending} />
      <ProblemNotice error={edit.error} title="The settings were not saved." />
    </View>
  );
}
