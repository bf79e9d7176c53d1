import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { TextLink } from '#components/ui/text-link.tsx';
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
          name="butcheryTenthPencePerKg"
          unit="poundsPerKg"
          label="Butchery"
          hint="Cutting, per kilogram of cold weight."
        />
        <FormNumber control={control} name="killPence" unit="pounds" label="Kill" hint="Per animal." />
        <FormNumber control={control} name="inspectionPence" unit="pounds" label="Inspection" hint="Per animal." />
        <FormNumber
          control={control}
          name="levyPence"
          unit="pounds"
          label="Levy"
          hint="Per animal, the abattoir's part with your own."
        />
        <FormNumber
          control={control}
          name="haulagePence"
          unit="pounds"
          label="Haulage"
          hint="To the abattoir and back, per animal."
        />
        <FormNumber
          control={control}
          name="cardRatePpht"
          unit="percent"
          label="Card fee"
          hint="What the card company keeps of each price."
        />
        <FormNumber control={control} name="cardFixedPence" unit="pounds" label="and for each payment" />
      </View>
      <TextLink href="/office/price-grid" place="alone">
        Price grid: what the carcases would bring deadweight
      </TextLink>
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
      <FormCheckbox
        control={control}
        name="isVertebralColumnPremisesAuthorised"
        label="The cutting premises are authorised to remove vertebral column"
        note="Opens the bone-in ways of older cattle again. Tick it only with the authorisation in hand: the official veterinarian and the licensed premises say what may leave them."
      />
      <Heading level={2}>Mincing</Heading>
      <FormSelect
        control={control}
        name="minceAgeEffect"
        label="Meat that is older than the limit"
        hint="Approved premises usually mince within six days of kill, or fifteen where beef was boned and vacuum-packed. Ask your local authority what applies to yours."
        options={[
          { value: 'none', label: 'Is minced; say nothing' },
          { value: 'caution', label: 'Is minced; show the caution' },
          { value: 'close', label: 'Is not minced' },
        ]}
      />
      <View style={css('w-fields')}>
        <FormNumber control={control} name="minceWithinDays" unit="count" label="Mince within" after="days of kill" />
        <FormNumber
          control={control}
          name="minceBaggedWithinDays"
          unit="count"
          label="Hung in the bag, within"
          after="days of kill"
        />
      </View>
      <View style={css('w-buttons')}>
        <Button label="Save the settings" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
