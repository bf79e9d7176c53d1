import type { FieldValues, Resolver } from 'react-hook-form';
import type { z } from 'zod';

/**
 * Checks a form by the contract's own schema, which comes with zod over `import()` when the first field is left:
 * the page shows without waiting for it.
 */
export function lazyResolver<In extends FieldValues, Out>(
  loadSchema: () => Promise<z.ZodType<Out, In>>,
): Resolver<In, unknown, Out> {
  return async (values, context, options) => {
    const [{ zodResolver }, schema] = await Promise.all([import('./form-schemas.ts'), loadSchema()]);
    return zodResolver(schema)(values, context, options);
  };
}
