import type { NavItem } from '#components/ui/nav-link.tsx';
import type { Role } from '#shared/domain/roles.ts';

const ownerPlaces: readonly NavItem[] = [
  { label: 'Today', href: '/office/today' },
  { label: 'Cutting days', href: '/office/cutting-days' },
  { label: 'Orders', href: '/office/orders' },
  { label: 'Herd', href: '/office/herd' },
  { label: 'Boxes', href: '/office/boxes' },
  { label: 'Specifications', href: '/office/specifications' },
  { label: 'Delivery', href: '/office/delivery-areas' },
  { label: 'Codes', href: '/office/promo-codes' },
  { label: 'Customers', href: '/office/customers' },
  { label: 'Trade', href: '/office/trade' },
  { label: 'E-mail', href: '/office/mails' },
  { label: 'Settings', href: '/office/settings' },
];

const packerPlaces: readonly NavItem[] = [{ label: 'Cutting days', href: '/office/cutting-days' }];

/** Packing and handing over is a packer's; whatever shows prices, margins or customers' histories is not. */
const PACKER_PATH = /^\/office(\/cutting-days(\/[^/]+\/(packing|run-sheet))?)?\/?$/;

/** The places of the office in the order of the farm's week, for those who work there. */
export function placesFor(role: Role): readonly NavItem[] {
  return role === 'owner' ? ownerPlaces : role === 'packer' ? packerPlaces : [];
}

export function mayOpen(role: Role, path: string): boolean {
  return role === 'owner' || (role === 'packer' && PACKER_PATH.test(path));
}

/** The pages of one cutting day, in the order in which the day is worked through. */
export function dayPlaces(dayId: string, role: Role): readonly NavItem[] {
  const at = `/office/cutting-days/${dayId}` as const;
  const packing: NavItem = { label: 'Packing', href: `${at}/packing` };
  const runSheet: NavItem = { label: 'Run sheet', href: `${at}/run-sheet` };
  if (role !== 'owner') return [packing, runSheet];
  return [
    { label: 'Carcases', href: at },
    { label: 'Allocation', href: `${at}/allocation` },
    { label: 'Margin', href: `${at}/margin` },
    packing,
    { label: 'Foreseen and weighed', href: `${at}/comparison` },
    { label: 'Collections', href: `${at}/collections` },
    runSheet,
  ];
}
