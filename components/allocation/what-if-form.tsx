import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import type { WhatIf } from '#shared/contracts/plan-jobs.ts';

type Named = { id: string; name: string };

type WhatIfFormProps = {
  control: Control<WhatIf>;
  /** In the order of the form's own lists. */
  boxes: readonly Named[];
  cuts: readonly Named[];
  onSubmit: () => void;
  busy: boolean;
};

/** What is supposed to be different: prices, demand, hanging time, number of carcases. */
export function WhatIfForm({ control, boxes, cuts, onSubmit, busy }: WhatIfFormProps) {
  return (
    <FormFrame name="What if" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormNumber
          control={control}
          name="moreCarcases"
          unit="count"
          label="Carcases more or fewer"
          hint="Such as 1 or -1. Added ones are like those of the day."
        />
        <FormNumber
          control={control}
          name="hangingDays"
          unit="count"
          label="Hanging time of all"
          after="days"
          hint="Left empty, each keeps its own. Weights taken after hanging do not count then."
          optional
        />
      </View>
      {boxes.map(({ id, name }, at) => (
        <View key={id} role="group" aria-label={name} style={css('w-fields')}>
          <FormNumber control={control} name={`boxes.${at}.pricePence`} unit="pounds" label={`${name}: price`} />
          <FormNumber
            control={control}
            name={`boxes.${at}.demandBoxes`}
            unit="count"
            label={`${name}: likely to sell`}
            after="boxes"
          />
        </View>
      ))}
      <Disclosure words={`Prices and demand of ${cuts.length} loose cuts`} ruled>
        <View style={css('w-stack')}>
          {cuts.map(({ id, name }, at) => (
            <View key={id} role="group" aria-label={name} style={css('w-fields')}>
              <FormNumber
                control={control}
                name={`cuts.${at}.tenthPencePerKg`}
                unit="poundsPerKg"
                label={`${name}: price`}
              />
              <FormNumber
                control={control}
                name={`cuts.${at}.looseDemandPacks`}
                unit="count"
                label={`${name}: likely to sell`}
                after="packs"
              />
            </View>
          ))}
        </View>
      </Disclosure>
      <View style={css('w-buttons')}>
        <Button label="See both answers" busy={busy} busyLabel="Working both out …" onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
