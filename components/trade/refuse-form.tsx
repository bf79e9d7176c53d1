import type { Control } from 'react-hook-form';
import { Button } from '#components/ui/button.tsx';
import { FormFrame } from '#components/ui/form-frame.tsx';
import { FormText } from '#components/ui/form-text.tsx';

export type Refusal = { version: number; answer: string };

type RefuseFormProps = { control: Control<Refusal>; busy: boolean; onSubmit: () => void };

/** A refusal says why, or what would be possible instead. */
export function RefuseForm({ control, busy, onSubmit }: RefuseFormProps) {
  return (
    <FormFrame name="Refuse the reservation" onSubmit={onSubmit}>
      <FormText control={control} name="answer" label="Answer to the butcher" hint="Why not, and what else there is." />
      <Button kind="danger" wide label="Refuse" busy={busy} onPress={onSubmit} />
    </FormFrame>
  );
}
