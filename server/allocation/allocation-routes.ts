import type { Deps } from '#server/deps.ts';
import type { Api } from '#server/http/route.ts';

export function addAllocationRoutes(_api: Api, _deps: Deps): void {}
