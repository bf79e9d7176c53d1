import { z } from 'zod';
import { Id, Line } from './fields-schema.ts';

export const Photograph = z.strictObject({
  id: Id,
  /** Where it is served, for ever the same. */
  href: z.string(),
  width: z.int(),
  height: z.int(),
  alt: z.string(),
});
export type Photograph = z.infer<typeof Photograph>;

const Photographs = z.strictObject({ photographs: z.array(Photograph) });
const BoxKind = z.strictObject({ boxKindId: Id });

/** Of a box, by its slug; empty while the drawings stand in. */
export const listPhotographsSchema = { params: z.strictObject({ slug: z.string().max(60) }), answer: Photographs };
export const listBoxPhotographsSchema = { params: BoxKind, answer: Photographs };
/** The body is the picture itself. */
export const addPhotographSchema = {
  params: BoxKind,
  query: z.strictObject({ alt: Line }),
  body: z.instanceof(Uint8Array, { error: 'Send a JPEG, PNG or WebP picture.' }),
  answer: Photographs,
};
export const removePhotographSchema = { params: z.strictObject({ photographId: Id }), answer: Photographs };
export const getPhotographSchema = {
  params: z.strictObject({ hash: z.string().regex(/^[0-9a-f]{64}$/) }),
  answer: z.string(),
};
