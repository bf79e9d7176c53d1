// The pictures of the README.
import { boxPath, nextDay, pastDay, pathOf } from './demo.mjs';
import { PHONE, WIDE } from './take.mjs';

export const pictures = [
  { name: 'shop-phone', window: PHONE, path: '/' },
  { name: 'shop-wide', window: WIDE, path: '/' },
  { name: 'box-phone', window: PHONE, find: (ask) => boxPath(ask) },
  { name: 'box-dark-phone', window: PHONE, scheme: 'dark', find: (ask) => boxPath(ask, 1) },
  { name: 'trade-wide', window: WIDE, role: 'butcher', path: '/trade' },
  { name: 'today-wide', window: WIDE, role: 'owner', path: '/office/today' },
  {
    name: 'carcase-wide',
    window: WIDE,
    role: 'owner',
    find: async (ask) => `/office/carcases/${(await nextDay(ask)).carcases[0].id}`,
  },
  {
    name: 'allocation-wide',
    window: WIDE,
    role: 'owner',
    find: async (ask) => `${pathOf(await nextDay(ask))}/allocation`,
  },
  {
    name: 'collections-wide',
    window: WIDE,
    role: 'owner',
    find: async (ask) => `${pathOf(await pastDay(ask))}/collections`,
  },
  {
    name: 'run-sheet-phone',
    window: PHONE,
    role: 'owner',
    find: async (ask) => `${pathOf(await pastDay(ask))}/run-sheet`,
  },
];
