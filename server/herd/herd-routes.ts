import type { Deps } from '#server/deps.ts';
import type { Api } from '#server/http/route.ts';

export function addHerdRoutes(_api: Api, _deps: Deps): void {}
