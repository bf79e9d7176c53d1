import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormCheckbox } from '#components/ui/form-checkbox.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormNumber } from '#components/ui/form-number.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import type { NewPromoCode } from '#shared/contracts/promo.ts';

type PromoFormProps = { control: Control<NewPromoCode>; onSubmit: () => void; busy: boolean };

/** A new code: a share or an amount, from when on it counts and how often. */
export function PromoForm({ control, onSubmit, busy }: PromoFormProps) {
  return (
    <FormFrame name="New code" onSubmit={onSubmit}>
      <FormText control={control} name="code" label="Code" hint="Three to twenty letters and figures." width="short" />
      <View style={css('w-fields')}>
        <FormNumber control={control} name="percent" unit="count" label="Takes off, in per cent" after="%" optional />
        <FormNumber control={control} name="amountPence" unit="pounds" label="or an amount" optional />
      </View>
      <View style={css('w-fields')}>
        <FormNumber control={control} name="minimumPence" unit="pounds" label="Goods from" />
        <FormText
          control={control}
          name="lastDay"
          label="Last day"
          hint="Such as 2026-12-31; empty for no end."
          width="short"
          emptyIsNull
          optional
        />
        <FormNumber control={control} name="usageLimit" unit="count" label="How often in all" optional />
      </View>
      <FormCheckbox
        control={control}
        name="isOncePerCustomer"
        label="Once per customer"
        note="By e-mail address and by account."
      />
      <View style={css('w-buttons')}>
        <Button label="Make the code" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
