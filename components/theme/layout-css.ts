const page = `
:root .w-page{width:100%;max-width:1120px;margin-inline:auto;padding-inline:20px;box-sizing:border-box}
:root .w-page-narrow{max-width:680px}
:root .w-page-full{max-width:none}
:root .w-main{padding-block:16px 56px;display:flex;flex-direction:column;flex:1 0 auto;min-width:0;outline:none}
:root .w-shell>.w-main{min-height:calc(100dvh - 80px);box-sizing:border-box}
:root .w-shell>.w-page-narrow{max-width:1120px}
:root .w-shell>.w-page-narrow>*{width:100%;max-width:42rem}
:root .w-stack{display:flex;flex-direction:column;gap:16px;min-width:0}
:root .w-stack-s{display:flex;flex-direction:column;gap:6px;min-width:0}
:root .w-stack-l{display:flex;flex-direction:column;gap:32px;min-width:0}
:root .w-row{display:flex;flex-direction:row;flex-wrap:wrap;gap:12px;align-items:center;min-width:0}
:root .w-row-between{display:flex;flex-direction:row;flex-wrap:wrap;gap:4px 16px;align-items:baseline;justify-content:space-between;min-width:0}
:root .w-row-fixed{flex-wrap:nowrap}
:root .w-grow{flex:1 1 0;min-width:0}
:root .w-grow-wide{flex:1 1 16rem;min-width:0}
:root .w-panel{background:var(--panel);padding:16px;border-radius:3px}
:root .w-ruled{border:0 solid var(--line);border-top-width:1px;padding-top:16px}
:root .w-rule-below{border:0 solid var(--line);border-bottom-width:1px;padding-bottom:8px}
:root .w-rows{display:flex;flex-direction:column;border:0 solid var(--line);border-top-width:1px;margin:0;padding:0}
:root .w-rows>*{border:0 solid var(--line);border-bottom-width:1px;padding-block:16px}
`;

const responsive = `
:root .w-columns{display:grid;grid-template-columns:minmax(0,1fr);gap:32px}
:root .w-tiles{display:grid;grid-template-columns:repeat(auto-fill,minmax(min(100%,16rem),1fr));gap:24px}
:root .w-fields{display:grid;grid-template-columns:repeat(auto-fit,minmax(min(100%,13rem),1fr));gap:16px 20px;align-items:start}
:root .w-buttons{display:flex;flex-direction:column;gap:12px;align-items:stretch}
:root .w-only-wide.w-only-wide{display:none}
@media (min-width:760px){
:root .w-page{padding-inline:32px}
:root .w-main{padding-block:28px 72px}
:root .w-columns{grid-template-columns:minmax(0,1fr) minmax(0,1fr);gap:48px}
:root .w-columns-side{grid-template-columns:minmax(0,2fr) minmax(0,1fr)}
:root .w-buttons{flex-direction:row;flex-wrap:wrap;align-items:center}
:root .w-only-narrow.w-only-narrow{display:none}
:root .w-only-wide.w-only-wide{display:flex}
}
@media (min-width:760px) and (max-width:999.98px){:root .w-columns-office{grid-template-columns:minmax(0,1fr)}}
@media (min-width:1000px){:root .w-columns-office{grid-template-columns:minmax(0,1fr) 18rem;gap:36px}}
`;

const output = `
:root .w-only-print{display:none}
@media (prefers-reduced-motion:reduce){*,*::before,*::after{animation-duration:.01ms!important;animation-iteration-count:1!important;transition-duration:.01ms!important;scroll-behavior:auto!important}}
@media print{
@page{margin:14mm}
html,body{background:#fff!important;color:#000!important}
:root .w-no-print{display:none!important}
:root .w-only-print{display:flex}
:root .w-page{max-width:none;padding:0}
:root .w-rows>*,tr{break-inside:avoid}
}
`;

/** Pages, columns, rows of rules, and what is shown only on a phone, on a wide screen or on paper. */
export const layoutCss = page + responsive + output;
