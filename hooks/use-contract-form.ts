import { useForm, type DefaultValues, type FieldValues, type Path, type UseFormReturn } from 'react-hook-form';
import type { z } from 'zod';
import { AppError } from '#shared/errors.ts';
import { lazyResolver } from './lazy-resolver.ts';

/** A form checked by the contract's own schema: on leaving a field, then on each change, and on sending. */
export function useContractForm<Values extends FieldValues>(
  loadSchema: () => Promise<z.ZodType<Values, Values>>,
  defaultValues: DefaultValues<Values>,
): UseFormReturn<Values, unknown, Values> {
  return useForm<Values, unknown, Values>({ mode: 'onTouched', resolver: lazyResolver(loadSchema), defaultValues });
}

/** Sends what was typed; the fields that the server refuses say so themselves. The mutation keeps the error for the notice. */
export function sendForm<Values extends FieldValues>(
  form: UseFormReturn<Values, unknown, Values>,
  send: (values: Values) => Promise<unknown>,
): () => void {
  const submit = form.handleSubmit(async (values) => {
    try {
      await send(values);
    } catch (error) {
      if (!(error instanceof AppError)) return;
      for (const [path, message] of Object.entries(error.fields ?? {})) {
        form.setError(path as Path<Values>, { type: 'server', message });
      }
    }
  });
  return () => void submit();
}
