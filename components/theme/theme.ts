import { darkPalette, lightPalette } from './tokens.ts';

/** What each colour is for. `action` is the one main action of a screen; `sold`, `held` and `free` fill the rail. */
export const lightRoles = {
  page: lightPalette.paper,
  panel: lightPalette.deepPaper,
  line: lightPalette.hairline,
  edge: lightPalette.fence,
  text: lightPalette.ink,
  quiet: lightPalette.quietInk,
  action: lightPalette.raddle,
  onAction: lightPalette.chalk,
  actionText: lightPalette.raddle,
  danger: lightPalette.deepRaddle,
  good: lightPalette.pasture,
  waiting: lightPalette.strawText,
  sold: lightPalette.deepRaddle,
  held: lightPalette.straw,
  heldHatch: lightPalette.strawHatch,
  free: lightPalette.pastureTint,
  freeEdge: lightPalette.pastureEdge,
} as const;

export type Role = keyof typeof lightRoles;

export const darkRoles: Record<Role, string> = {
  page: darkPalette.paper,
  panel: darkPalette.deepPaper,
  line: darkPalette.hairline,
  edge: darkPalette.fence,
  text: darkPalette.ink,
  quiet: darkPalette.quietInk,
  action: darkPalette.raddle,
  onAction: darkPalette.chalk,
  actionText: darkPalette.lampRaddle,
  danger: darkPalette.lampRaddle,
  good: darkPalette.pasture,
  waiting: darkPalette.strawText,
  sold: darkPalette.deepRaddle,
  held: darkPalette.straw,
  heldHatch: darkPalette.strawHatch,
  free: darkPalette.pastureTint,
  freeEdge: darkPalette.pastureEdge,
};

function variablesOf(roles: Record<Role, string>): string {
  return Object.entries(roles)
    .map(([role, colour]) => `--${role}:${colour};`)
    .join('');
}

/** The colour variables of both schemes: the device's wish counts until `data-scheme` on the root says otherwise. */
export const schemeCss = `
:root{color-scheme:light;${variablesOf(lightRoles)}}
@media (prefers-color-scheme:dark){:root:not([data-scheme=light]){color-scheme:dark;${variablesOf(darkRoles)}}}
:root[data-scheme=dark]{color-scheme:dark;${variablesOf(darkRoles)}}
@media print{:root,:root[data-scheme]{color-scheme:light;${variablesOf(lightRoles)}}}
`;
