import { endpoint } from './endpoint.ts';
import type * as schema from './photographs-schema.ts';

export type { Photograph } from './photographs-schema.ts';

export const listPhotographs = endpoint<typeof schema.listPhotographsSchema>(
  'GET',
  '/api/boxes/:slug/photographs',
  'public',
);
export const getPhotograph = endpoint<typeof schema.getPhotographSchema>('GET', '/api/photographs/:hash', 'public');
export const listBoxPhotographs = endpoint<typeof schema.listBoxPhotographsSchema>(
  'GET',
  '/api/office/box-kinds/:boxKindId/photographs',
  ['owner'],
);
export const addPhotograph = endpoint<typeof schema.addPhotographSchema>(
  'POST',
  '/api/office/box-kinds/:boxKindId/photographs',
  ['owner'],
);
export const removePhotograph = endpoint<typeof schema.removePhotographSchema>(
  'DELETE',
  '/api/office/photographs/:photographId',
  ['owner'],
);
