import {
  useForm,
  type DefaultValues,
  type FieldValues,
  type Path,
  type Resolver,
  type UseFormReturn,
} from 'react-hook-form';
import type { z } from 'zod';
import { AppError } from '#shared/errors.ts';

/**
 * A form checked by the contract's own schema: on leaving a field, then on each change, and on sending. Schema and
 * checker are fetched when first needed, so that a page does not load them to be read. What is sent is as typed; the
 * server parses it again.
 */
export function useContractForm<Values extends FieldValues>(
  load: () => Promise<z.ZodType<unknown, Values>>,
  defaultValues: DefaultValues<Values>,
): UseFormReturn<Values> {
  const resolver: Resolver<Values> = async (values, context, options) => {
    const [{ zodResolver }, schema] = await Promise.all([import('@hookform/resolvers/zod'), load()]);
    return zodResolver(schema, undefined, { raw: true })(values, context, options);
  };
  return useForm<Values>({ mode: 'onTouched', resolver, defaultValues });
}

/** Sends what was typed; the fields that the server refuses say so themselves. Other errors stay with the mutation. */
export function sendForm<Values extends FieldValues>(
  form: UseFormReturn<Values>,
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
