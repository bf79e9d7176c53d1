import { Link, type Href } from 'expo-router';
import type { ReactNode } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from './button.tsx';
import { isAt, NavLink, type NavItem } from './nav-link.tsx';
import { SkipLink } from './skip-link.tsx';
import { Text } from './text.tsx';

type TradeShellProps = {
  farmName: string;
  homeHref: Href;
  path: string;
  links: readonly NavItem[];
  /** The butcher's business, once known. */
  business?: string | undefined;
  onSignOut?: (() => void) | undefined;
  children: ReactNode;
};

/** The trade area's frame: whose counter it is, its places in one strip, and the way out. */
export function TradeShell(props: TradeShellProps) {
  const { farmName, links, path, business, onSignOut } = props;
  return (
    <View style={css('w-shell')}>
      <SkipLink />
      <View role="banner" style={css('w-page')}>
        <View style={css('w-head')}>
          <Link href={props.homeHref} style={css('t-mark', 'w-mark')}>
            {farmName}
            <span className="w-mark-more">Trade</span>
          </Link>
          {onSignOut ? <Button kind="quiet" small label="Sign out" onPress={onSignOut} /> : null}
        </View>
        {business ? (
          <Text size="small" tone="quiet">
            {business}
          </Text>
        ) : null}
      </View>
      {links.length > 0 ? (
        <View role="navigation" aria-label="Trade" style={css('w-strip')}>
          <View style={css('w-page')}>
            <View style={css('w-nav')}>
              {links.map((link) => (
                <NavLink key={link.label} {...link} current={isAt(path, link)} />
              ))}
            </View>
          </View>
        </View>
      ) : null}
      <View role="main" id="main" tabIndex={-1} style={css('w-page', 'w-main')}>
        {props.children}
      </View>
    </View>
  );
}
