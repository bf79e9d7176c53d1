import { Link, type Href } from 'expo-router';
import { Icon, type IconName } from './icon.tsx';
import { css } from '#components/theme/css.ts';

/** A page of the app; or `outside` it: a file, a mail address, a telephone number, another site. */
export type Destination = { href: Href; outside?: false } | { href: string; outside: true };

type TextLinkProps = Destination & {
  children: string;
  /** `alone` stands by itself with a full-size target; `inline` runs in a sentence. */
  place?: 'inline' | 'alone';
  tone?: 'action' | 'ink';
  icon?: IconName;
  /** The whole name for screen readers, when the words alone would not tell links apart. Starts with the words. */
  name?: string | undefined;
  current?: boolean;
};

export function TextLink({ href, children, icon, name, ...how }: TextLinkProps) {
  const { place = 'inline', tone = 'action', outside = false, current = false } = how;
  const alone = place === 'alone';
  return (
    <Link
      href={href as Href}
      {...(outside ? { target: '_self' as const } : {})}
      {...(name === undefined ? {} : { 'aria-label': name })}
      {...(current ? { 'aria-current': 'page' as const } : {})}
      style={css('w-link', tone === 'ink' && 'w-link-ink', alone && 'w-link-alone')}
    >
      {icon === 'back' ? <Icon name="back" size={18} /> : null}
      {children}
      {icon && icon !== 'back' ? <Icon name={icon} size={18} /> : null}
    </Link>
  );
}
