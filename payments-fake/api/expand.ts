import { findObject, type Store } from '../store.ts';
import { invalidRequest } from './faults.ts';
import { toJson, type Json, type JsonObject } from './json.ts';
import { listWhole } from './lists.ts';

const deepest = 4;

function refuse(path: string): never {
  throw invalidRequest(`This property cannot be expanded (${path}).`, { param: 'expand' });
}

/** Lists that an object carries only when they are asked for. */
function findIncludable(store: Store, node: JsonObject, name: string): Json | undefined {
  if (typeof node.id !== 'string') return undefined;
  if (node.object === 'checkout.session' && name === 'line_items') {
    const items = store.checkouts.get(node.id)?.lineItems ?? [];
    return toJson(listWhole(items, `/v1/checkout/sessions/${node.id}/line_items`));
  }
  if (node.object === 'charge' && name === 'refunds') {
    const refunds = [...store.refunds.values()].map((record) => record.refund);
    const own = refunds.filter((refund) => refund.charge === node.id).reverse();
    return toJson(listWhole(own, `/v1/charges/${node.id}/refunds`));
  }
  return undefined;
}

/** `rest` is what is left of `path` below this node. */
function expandBelow(store: Store, node: Json, { rest, path }: { rest: string[]; path: string }): void {
  const [name, ...further] = rest;
  if (name === undefined || node === null) return;
  if (Array.isArray(node)) {
    for (const item of node) expandBelow(store, item, { rest, path });
    return;
  }
  if (typeof node !== 'object') refuse(path);
  const present = node[name] ?? findIncludable(store, node, name);
  if (present === undefined || present === null) {
    if (!(name in node)) refuse(path);
    return;
  }
  const found = typeof present === 'string' ? findObject(store, present) : present;
  if (found === undefined) refuse(path);
  const value = toJson(found);
  node[name] = value;
  expandBelow(store, value, { rest: further, path });
}

/** A copy of the answer in which the ids at these paths are replaced by the objects that they name. */
export function expand(store: Store, answer: object, paths: string[]): Json {
  const copy = toJson(answer);
  for (const path of paths) {
    const rest = path.split('.');
    if (rest.length > deepest) throw invalidRequest(`You cannot expand more than ${deepest} levels: ${path}`);
    expandBelow(store, copy, { rest, path });
  }
  return copy;
}
