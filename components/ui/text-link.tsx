import { Link, type Href } from 'expo-router';
import { Icon, type IconName } from './icon.tsx';
import { css } from '#components/theme/css.ts';

type TextLinkProps = {
  href: Href;
  children: string;
  /** `alone` stands by itself with a full-size target; `inline` runs in a sentence. */
  place?: 'inline' | 'alone';
  tone?: 'action' | 'ink';
  icon?: IconName;
  /** Leaves the app: a file, a mail address, a telephone number, another site. */
  outside?: boolean;
  /** The whole name for screen readers, when the words alone would not tell links apart. Starts with the words. */
  name?: string | undefined;
  current?: boolean;
};

export function TextLink({ href, children, icon, name, ...how }: TextLinkProps) {
  const { place = 'inline', tone = 'action', outside = false, current = false } = how;
  const alone = place === 'alone';
  return (
    <Link
      href={href}
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
