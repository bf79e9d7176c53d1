import { Link, type Href } from 'expo-router';
import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { isAt, NavLink, type NavItem } from './nav-link.tsx';
import { SkipLink } from './skip-link.tsx';

type ShopShellProps = {
  farmName: string;
  basketCount: number;
  basketHref: Href;
  homeHref: Href;
  /** Path of the page, to mark where the reader is. */
  path: string;
  links: readonly NavItem[];
  children: ReactNode;
};

/** The shop's frame: the farm's name, the places, the basket. Each page brings its own `main` and foot. */
export function ShopShell(props: ShopShellProps) {
  const { farmName, basketCount, links, path } = props;
  return (
    <View style={css('w-shell')}>
      <SkipLink />
      <View role="banner" style={css('w-page')}>
        <View style={css('w-head')}>
          <Link href={props.homeHref} style={css('t-mark', 'w-mark')}>
            {farmName}
          </Link>
          <View role="navigation" aria-label="Shop" style={css('w-nav', 'w-only-wide', 'w-head-links')}>
            {links.map((link) => (
              <NavLink key={link.label} {...link} current={isAt(path, link)} />
            ))}
          </View>
          <Link href={props.basketHref} aria-label={basketName(basketCount)} style={css('w-nav-link', 'w-basket')}>
            {`Basket · ${basketCount}`}
          </Link>
        </View>
      </View>
      {props.children}
    </View>
  );
}

/** Starts with the words that are seen, so that people who speak to their phone can say them. */
function basketName(count: number): string {
  return `Basket · ${count} ${count === 1 ? 'thing' : 'things'} in it`;
}
