/** Plain on purpose: the page belongs to another company, and to a made-up one. */
export const style = `
:root { color-scheme: light dark; --ink: #1d2733; --paper: #f3f5f7; --card: #ffffff; --line: #77828f; --soft: #4c5865;
  --act: #1c4f8c; --on-act: #ffffff; --bad: #a3171f; --bad-paper: #fdeeee; }
@media (prefers-color-scheme: dark) { :root { --ink: #e8edf2; --paper: #14191f; --card: #1e252d; --line: #8a97a5;
  --soft: #b3bfcb; --act: #9cc4f2; --on-act: #10202f; --bad: #ffb1b1; --bad-paper: #3a1d1f; } }
* { box-sizing: border-box; }
body { margin: 0; background: var(--paper); color: var(--ink); font: 1rem/1.5 system-ui, sans-serif; }
main { max-width: 32rem; margin: 0 auto; padding: 1.25rem 1rem 3rem; }
header { display: flex; justify-content: space-between; gap: 1rem; align-items: baseline; flex-wrap: wrap; }
.mark { font-weight: 600; }
.tag { font-size: 0.875rem; color: var(--soft); }
h1 { font-size: 1.25rem; margin: 1.25rem 0 0; font-weight: 600; }
h2 { font-size: 1rem; margin: 0 0 0.5rem; }
.total { font-size: 2rem; font-variant-numeric: tabular-nums; font-weight: 600; margin: 0 0 1rem; }
table { width: 100%; border-collapse: collapse; margin: 0 0 1.5rem; font-variant-numeric: tabular-nums; }
td, th { padding: 0.5rem 0; border-bottom: 1px solid var(--line); text-align: left; font-weight: 400; vertical-align: top; }
td { text-align: right; white-space: nowrap; padding-left: 1rem; }
tfoot th, tfoot td { font-weight: 600; border-bottom: 0; }
form { background: var(--card); border: 1px solid var(--line); border-radius: 4px; padding: 1rem; }
label { display: block; font-weight: 600; margin-bottom: 0.25rem; }
.field { margin: 0 0 1rem; }
.pair { display: grid; grid-template-columns: 1fr 1fr; gap: 1rem; }
input { width: 100%; min-height: 44px; font: inherit; padding: 0.5rem 0.625rem; border: 1px solid var(--line);
  border-radius: 4px; background: var(--card); color: var(--ink); }
input[aria-invalid='true'] { border: 2px solid var(--bad); }
.hint { font-size: 0.875rem; color: var(--soft); margin: 0.25rem 0 0; }
.error { color: var(--bad); margin: 0.25rem 0 0; font-weight: 600; }
.problem { background: var(--bad-paper); color: var(--bad); border: 1px solid var(--bad); border-radius: 4px;
  padding: 0.75rem 1rem; margin: 0 0 1rem; }
button { width: 100%; min-height: 48px; font: inherit; font-weight: 600; border: 2px solid var(--act);
  border-radius: 4px; background: var(--act); color: var(--on-act); cursor: pointer; }
button.second { background: transparent; color: var(--act); margin-top: 0.75rem; }
a { color: var(--act); display: inline-block; padding: 0.625rem 0; }
:focus-visible { outline: 3px solid var(--act); outline-offset: 2px; }
details { margin-top: 1.25rem; }
summary { min-height: 44px; padding: 0.625rem 0; cursor: pointer; }
dl { margin: 0; }
dt { font-family: ui-monospace, monospace; margin-top: 0.5rem; }
dd { margin: 0; color: var(--soft); }
`;
