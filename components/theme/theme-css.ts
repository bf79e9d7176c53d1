import { schemeCss } from './theme.ts';

// `:root` in front outweighs the resets that React Native Web writes for its own elements.
const base = `
html{-webkit-text-size-adjust:100%;text-size-adjust:100%;background:var(--page);color:var(--text);scroll-padding-top:16px}
body{margin:0;background:var(--page);color:var(--text);font:400 1rem/1.5 'Public Sans','Public Sans stand-in',system-ui,sans-serif;overflow-wrap:break-word}
::selection{background:var(--held);color:var(--text)}
:root :focus-visible{outline:3px solid var(--text);outline-offset:2px;border-radius:3px}
:root main:focus-visible{outline:none}
:root .w-hidden{position:absolute;width:1px;height:1px;margin:-1px;padding:0;overflow:hidden;clip-path:inset(50%);white-space:nowrap;border:0}
`;

const sans = `font-family:'Public Sans','Public Sans stand-in',system-ui,sans-serif`;
const clarendon = `font-family:'Besley','Besley stand-in',Georgia,serif`;

// The first rule gives every part of the kit its letter, and gives way to any that names another.
// Besley's noughts of one width are drawn light in every weight: prices take its ordinary figures.
const type = `
html:root :where([class^='w-'],[class*=' w-']){${sans}}
:root .t-text{${sans};font-weight:400;font-size:1rem;line-height:1.5;color:var(--text);margin:0}
:root .t-lead{font-size:1.125rem;line-height:1.5;text-wrap:pretty}
:root .t-small{font-size:.875rem;line-height:1.45}
:root .t-tiny{font-size:.75rem;line-height:1.35}
:root .t-strong{font-weight:600}
:root .t-bold{font-weight:700}
:root .t-quiet{color:var(--quiet)}
:root .t-good{color:var(--good)}
:root .t-waiting{color:var(--waiting)}
:root .t-danger{color:var(--danger)}
:root .t-action{color:var(--actionText)}
:root .t-end{text-align:end}
:root .t-centre{text-align:center}
:root .t-figures{font-variant-numeric:tabular-nums lining-nums}
:root .t-nowrap{white-space:nowrap}
:root .t-measure{max-width:38rem}
:root .t-caps{${sans};font-size:.8125rem;line-height:1.4;font-weight:600;letter-spacing:.085em;text-transform:uppercase;color:var(--quiet);margin:0}
:root .t-display{${clarendon};font-weight:800;font-size:2.25rem;line-height:1.1;letter-spacing:-.012em;color:var(--text);margin:0;text-wrap:balance}
:root .t-title{${clarendon};font-weight:700;font-size:1.875rem;line-height:1.15;letter-spacing:-.008em;color:var(--text);margin:0;text-wrap:balance}
:root .t-section{${clarendon};font-weight:700;font-size:1.375rem;line-height:1.2;color:var(--text);margin:0}
:root .t-item{${clarendon};font-weight:700;font-size:1.25rem;line-height:1.25;color:var(--text);margin:0}
:root .t-sub{${sans};font-weight:700;font-size:1.0625rem;line-height:1.35;color:var(--text);margin:0}
:root .t-price{${clarendon};font-weight:700;font-size:1.375rem;line-height:1.2;color:var(--text);font-variant-numeric:lining-nums;white-space:nowrap}
:root .t-price-large{font-size:1.875rem;line-height:1.15}
:root .t-mark{${clarendon};font-weight:700;font-size:1.25rem;line-height:1.2;color:var(--text);letter-spacing:-.005em}
@media (min-width:760px){
:root .t-display{font-size:3.25rem;line-height:1.06}
:root .t-title{font-size:2.125rem}
:root .t-section{font-size:1.5rem}
}
`;

const links = `
:root .w-link{max-width:100%;overflow-wrap:anywhere;color:var(--actionText);font-weight:600;text-decoration-line:underline;text-decoration-thickness:1px;text-underline-offset:.2em;text-decoration-color:color-mix(in srgb,currentColor 45%,transparent)}
:root .w-link:hover{text-decoration-color:currentColor;text-decoration-thickness:2px}
:root .w-link-ink{color:var(--text);font-weight:400}
:root .w-link-alone{${sans};font-size:1rem;line-height:1.3;display:inline-flex;align-items:center;min-height:44px;text-decoration-line:none;gap:.35em}
:root .w-link-alone:hover{text-decoration-line:underline}
:root .w-icon{flex:none;display:block}
`;

/** Colours of both schemes, letters, links and the ring of what has the keyboard. Goes once into the page's head. */
export const themeCss = schemeCss + base + type + links;
