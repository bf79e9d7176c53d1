import { View } from 'react-native';
import type { Control } from 'react-hook-form';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormSelect } from '#components/ui/form-select.tsx';
import { FormText } from '#components/ui/form-text.tsx';
import type { SpecificationCopy } from '#shared/contracts/specifications.ts';

type CopyFormProps = {
  control: Control<SpecificationCopy>;
  sources: readonly { id: string; label: string }[];
  onSubmit: () => void;
  busy: boolean;
};

/** A specification of the farm's own, started from another one. */
export function CopyForm({ control, sources, onSubmit, busy }: CopyFormProps) {
  return (
    <FormFrame name="A specification of your own" onSubmit={onSubmit}>
      <View style={css('w-fields')}>
        <FormSelect
          control={control}
          name="fromId"
          label="Start from"
          placeholder="Choose one"
          options={sources.map(({ id, label }) => ({ value: id, label }))}
        />
        <FormText control={control} name="name" label="Its name" hint="As your cutter knows it." />
      </View>
      <View style={css('w-buttons')}>
        <Button label="Make this specification" busy={busy} onPress={onSubmit} />
      </View>
    </FormFrame>
  );
}
