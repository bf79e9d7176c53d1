import { Link, type Href } from 'expo-router';
import { useState, type ReactNode } from 'react';
import { Pressable, Text as NativeText, View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from './button.tsx';
import { isAt, NavLink, type NavItem } from './nav-link.tsx';
import { SchemeSwitch } from './scheme-switch.tsx';
import { Sheet } from './sheet.tsx';
import { SkipLink } from './skip-link.tsx';
import { Text } from './text.tsx';

type OfficeShellProps = {
  farmName: string;
  homeHref: Href;
  path: string;
  /** In the order of the farm's week. The first three have a place in the bar of a phone, the rest under Menu. */
  links: readonly NavItem[];
  person?: string | undefined;
  onSignOut?: (() => void) | undefined;
  children: ReactNode;
};

const IN_BAR = 3;

/** The office's frame: places at the left of a wide screen, in a bar at the thumb of a phone. */
export function OfficeShell(props: OfficeShellProps) {
  const { farmName, homeHref, path, links, children } = props;
  const [menuAt, setMenuAt] = useState<string>();
  // Walking on to another page closes the menu.
  const menuOpen = menuAt === path;
  return (
    <View style={css('w-office')}>
      <SkipLink />
      <View role="navigation" aria-label="Office" style={css('w-office-side')}>
        <Link href={homeHref} style={css('t-mark', 'w-mark')}>
          {farmName}
        </Link>
        <Places {...props} />
      </View>
      <View role="banner" style={css('w-office-top')}>
        <Link href={homeHref} style={css('t-mark', 'w-mark')}>
          {farmName}
        </Link>
        <Text size="small" tone="quiet">
          Office
        </Text>
      </View>
      <View role="main" id="main" tabIndex={-1} style={css('w-office-main')}>
        {children}
      </View>
      <View role="navigation" aria-label="Office, in short" style={css('w-office-bar')}>
        {links.slice(0, IN_BAR).map((link) => (
          <NavLink key={link.label} {...link} current={isAt(path, link)} look="bare" />
        ))}
        <Pressable role="button" aria-haspopup="dialog" aria-expanded={menuOpen} onPress={() => setMenuAt(path)}>
          <NativeText style={css('t-text', 't-small')}>Menu</NativeText>
        </Pressable>
      </View>
      <Sheet open={menuOpen} onClose={() => setMenuAt(undefined)} title="Office">
        <Places {...props} />
      </Sheet>
    </View>
  );
}

function Places({ links, path, person, onSignOut }: OfficeShellProps) {
  return (
    <>
      <View style={css('w-office-list')}>
        {links.map((link) => (
          <NavLink key={link.label} {...link} current={isAt(path, link)} />
        ))}
      </View>
      <View style={css('w-office-foot')}>
        <SchemeSwitch />
        {person ? (
          <Text size="small" tone="quiet">
            {person}
          </Text>
        ) : null}
        {onSignOut ? <Button kind="quiet" small label="Sign out" onPress={onSignOut} /> : null}
      </View>
    </>
  );
}
