import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { isAt, NavLink, type NavItem } from './nav-link.tsx';
import { SchemeSwitch } from './scheme-switch.tsx';

type ShopFootProps = {
  path: string;
  links: readonly NavItem[];
  /** Whose shop this is and how to reach them. */
  children: ReactNode;
};

/** The foot of a shop page: the farm, every place of the shop, light or dark. */
export function ShopFoot({ path, links, children }: ShopFootProps) {
  return (
    <View role="contentinfo" style={css('w-foot')}>
      <View style={css('w-page', 'w-foot-columns')}>
        <View style={css('w-stack-s')}>{children}</View>
        <View role="navigation" aria-label="All of the shop" style={css('w-foot-links')}>
          {links.map((link) => (
            <NavLink key={link.label} {...link} current={isAt(path, link)} />
          ))}
        </View>
        <SchemeSwitch />
      </View>
    </View>
  );
}
