import * as contract from '#shared/contracts/photographs.ts';
import * as schema from '#shared/contracts/photographs-schema.ts';
import type { Deps } from '#server/deps.ts';
import { download, route, signedIn, type Api } from '#server/http/route.ts';
import { addPhotograph, getPhotograph, readPhotographs, removePhotograph } from './photograph-service.ts';

export function addPhotographRoutes(api: Api, deps: Deps): void {
  route(api, contract.listPhotographs, {
    schema: schema.listPhotographsSchema,
    handle: ({ params }) => readPhotographs(deps.db, { slug: params.slug }),
  });
  download(api, contract.getPhotograph, {
    schema: schema.getPhotographSchema,
    handle: async ({ params }) => {
      const { contentType, bytes } = await getPhotograph(deps.db, params.hash);
      return { contentType, filename: params.hash, body: bytes, isImmutable: true };
    },
  });
  route(api, contract.listBoxPhotographs, {
    schema: schema.listBoxPhotographsSchema,
    handle: ({ params }) => readPhotographs(deps.db, { id: params.boxKindId }),
  });
  route(api, contract.addPhotograph, {
    schema: schema.addPhotographSchema,
    handle: ({ params, query, body }, caller) =>
      addPhotograph(deps, signedIn(caller).id, { boxKindId: params.boxKindId, alt: query.alt, bytes: body }),
  });
  route(api, contract.removePhotograph, {
    schema: schema.removePhotographSchema,
    handle: ({ params }, caller) => removePhotograph(deps, signedIn(caller).id, params.photographId),
  });
}
