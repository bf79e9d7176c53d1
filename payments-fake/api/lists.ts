import type Stripe from 'stripe';
import { noSuchReference } from './faults.ts';
import type { Params } from './params.ts';

const usualLimit = 10;
const mostItems = 100;

type Listed = { id: string };
type Page<Item> = Stripe.ApiList<Item>;

/** The items of one page. `all` stands in the order of the list. */
export function listPage<Item extends Listed>(all: Item[], params: Params, url: string): Page<Item> {
  const limit = params.integer('limit', { min: 1, max: mostItems }) ?? usualLimit;
  const placeOf = (param: 'starting_after' | 'ending_before') => {
    const id = params.text(param);
    if (id === null) return null;
    const place = all.findIndex((item) => item.id === id);
    if (place < 0) throw noSuchReference('object', id, param);
    return place;
  };
  const after = placeOf('starting_after');
  const before = placeOf('ending_before');
  const open = all.slice(after === null ? 0 : after + 1, before ?? all.length);
  const data = before === null ? open.slice(0, limit) : open.slice(-limit);
  return { object: 'list', data, has_more: open.length > limit, url };
}

/** The first ten of a list inside another object. */
export function listWhole<Item extends Listed>(all: Item[], url: string): Page<Item> {
  return { object: 'list', data: all.slice(0, usualLimit), has_more: all.length > usualLimit, url };
}

/** `created` as an instant or as a range: created[gte], created[lt] ... */
export function readCreated(params: Params): (item: { created: number }) => boolean {
  const instant = { min: 0, max: 1e11 };
  if (params.isText('created')) {
    const exact = params.integer('created', instant);
    return ({ created }) => created === exact;
  }
  const range = params.part('created');
  if (!range) return () => true;
  const bound = (name: string, none: number) => range.integer(name, instant) ?? none;
  const [gt, gte] = [bound('gt', -Infinity), bound('gte', -Infinity)];
  const [lt, lte] = [bound('lt', Infinity), bound('lte', Infinity)];
  return ({ created }) => created > gt && created >= gte && created < lt && created <= lte;
}

/** A filter by a member that holds an id or a word. */
export function readFilter<Name extends string>(
  params: Params,
  name: Name,
): (item: { [key in Name]?: unknown }) => boolean {
  const wanted = params.text(name);
  return (item) => wanted === null || item[name] === wanted;
}
