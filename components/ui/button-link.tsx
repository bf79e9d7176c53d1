import { Link, type Href } from 'expo-router';
import type { ButtonKind } from './button.tsx';
import { Icon, type IconName } from './icon.tsx';
import type { Destination } from './text-link.tsx';
import { css } from '#components/theme/css.ts';

type ButtonLinkProps = Destination & {
  label: string;
  kind?: ButtonKind;
  wide?: boolean;
  small?: boolean;
  icon?: IconName;
  name?: string | undefined;
};

/** Looks like a button, but goes somewhere: a real link, so it can be opened in a new tab. */
export function ButtonLink({ href, label, kind = 'primary', ...how }: ButtonLinkProps) {
  return (
    <Link
      href={href as Href}
      {...(how.outside ? { target: '_self' as const } : {})}
      {...(how.name === undefined ? {} : { 'aria-label': how.name })}
      style={css('w-button', `w-button-${kind}`, how.wide && 'w-button-full', how.small && 'w-button-small')}
    >
      {how.icon && how.icon !== 'forward' ? <Icon name={how.icon} /> : null}
      {label}
      {how.icon === 'forward' ? <Icon name="forward" /> : null}
    </Link>
  );
}
