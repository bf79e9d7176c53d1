import type { NavItem } from '#components/ui/nav-link.tsx';

/** The farm's mark in the head of every page: part of the look, as the letters are. The full name is a setting. */
export const FARM_MARK = 'Skelderwick';

export const shopPlaces: readonly NavItem[] = [
  { label: 'Boxes', href: '/' },
  { label: 'Loose cuts', href: '/cuts' },
  { label: 'Your account', href: '/account' },
];

export const footPlaces: readonly NavItem[] = [
  ...shopPlaces,
  { label: 'Basket', href: '/basket' },
  { label: 'For butchers', href: '/trade' },
];
