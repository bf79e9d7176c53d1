import type { Deps } from '../deps.ts';
import type { Api } from '../http/route.ts';

export function addTradeRoutes(_api: Api, _deps: Deps): void {}
