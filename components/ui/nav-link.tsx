import { Link, type Href } from 'expo-router';
import { css } from '#components/theme/css.ts';

export type NavItem = { label: string; href: Href };

type NavLinkProps = NavItem & { current: boolean; look?: 'link' | 'bare' };

/** A place of the app in a bar or a list of places. `bare` takes the look of the bar that it stands in. */
export function NavLink({ label, href, current, look = 'link' }: NavLinkProps) {
  return (
    <Link
      href={href}
      {...(current ? { 'aria-current': 'page' as const } : {})}
      style={css(look === 'link' ? 'w-nav-link' : 't-nowrap')}
    >
      {label}
    </Link>
  );
}

/** Whether a page stands at a place or below it: `/office/herd/12` is at `/office/herd`. Only the start is at `/`. */
export function isAt(path: string, { href }: NavItem): boolean {
  const place = typeof href === 'string' ? href : href.pathname;
  return path === place || (place !== '/' && path.startsWith(`${place}/`));
}
