import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { Heading } from '#components/ui/heading.tsx';
import type { Settings } from '#shared/contracts/office.ts';

type SettingsFormProps = { control: Control<Settings>; onSubmit: () => void; busy: boolean };

/** What the plans reckon with. Saved settings are in force from today on; earlier days keep theirs. */
export function SettingsForm({ control, onSubmit, busy }: SettingsFormProps) {
  return (
    <FormFrame name="Settings" onSubmit={onSubmit}>
      <Heading level={2}>Money</Heading>
      <View style={css('w-fields')}>
        <FormNumber
          control={control}
          name="deadweightTenthPencePerKg"
          unit="poundsPerKg"
          label="Deadweight price"
          hint="What the same carcase would bring, sold by the kilogram of cold weight."
        />
        <FormNumber
          control={control}
          name="butcheryTenthPencePerKg"
          unit="poundsPerKg"
          label="Butchery"
          hint="Cutting, per kilogram of cold weight."
        />
        <FormNumber control={control} name="killPence" unit="pounds" label="Kill" hint="Per animal." />
      </View>
      <Heading level={2}>Trade</Heading>
      <FormCheckbox
        control={control}
        name="isReallocationAutomatic"
        label="Work in a butcher's reservation by itself"
        note="Where the plan can meet it without touching what is sold or held. Otherwise it waits for you."
      />
      <Heading level={2}>Older cattle</Heading>
      <FormCheckbox
        control={control}
        name="isVertebralColumnRuleActive"
        label="Close the bone-in cuts that carry vertebral column"
        note="Ask your local authority or the official veterinarian what applies to your premises."
      />
      <FormNumber control={control} name="vertebralColumnMonths" unit="count" label="For cattle over" after="months" />
      <View style={css('w-buttons')}>
        <Button label="Save the settings" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
