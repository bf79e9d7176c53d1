import type { ControllerFieldState } from 'react-hook-form';

type Controlled = { fieldState: ControllerFieldState; formState: { isSubmitted: boolean } };

/**
 * What stands beside a field. A list that grows is checked at once, its new row included: a field complains only after
 * it was left or the form was sent. An error that goes away as its field is left would move the button under the finger.
 */
export function shownError({ fieldState, formState }: Controlled): string | undefined {
  return fieldState.isTouched || formState.isSubmitted ? fieldState.error?.message : undefined;
}
