import { Link, type Href } from 'expo-router';
import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { NavLink, type NavItem } from './nav-link.tsx';
import { SchemeSwitch } from './scheme-switch.tsx';
import { isAt } from './nav-link.tsx';
import { SkipLink } from './skip-link.tsx';

type ShopShellProps = {
  farmName: string;
  basketCount: number;
  basketHref: Href;
  homeHref: Href;
  /** Path of the page, to mark where the reader is. */
  path: string;
  links: readonly NavItem[];
  /** Lesser places, in the foot alone: terms, sign in, trade. */
  footLinks?: readonly NavItem[];
  /** Address, opening times and what the law asks to be said. */
  foot?: ReactNode;
  children: ReactNode;
};

/** The shop's frame: the farm's name, the basket, the places, and a foot that repeats them. */
export function ShopShell(props: ShopShellProps) {
  const { farmName, basketCount, links, path, footLinks = [] } = props;
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
      <View role="main" id="main" tabIndex={-1} style={css('w-page', 'w-main')}>
        {props.children}
      </View>
      <View role="contentinfo" style={css('w-foot')}>
        <View style={css('w-page', 'w-foot-columns')}>
          <View style={css('w-stack-s')}>{props.foot}</View>
          <View role="navigation" aria-label="All of the shop" style={css('w-stack-s')}>
            {[...links, ...footLinks].map((link) => (
              <NavLink key={link.label} {...link} current={isAt(path, link)} />
            ))}
          </View>
          <SchemeSwitch />
        </View>
      </View>
    </View>
  );
}

/** Starts with the words that are seen, so that people who speak to their phone can say them. */
function basketName(count: number): string {
  return `Basket · ${count} ${count === 1 ? 'thing' : 'things'} in it`;
}
