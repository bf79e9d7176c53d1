const header = `
:root .w-shell{display:flex;flex-direction:column;min-height:100dvh;background:var(--page)}
:root .w-skip{position:absolute;left:8px;top:-100px;z-index:10;background:var(--page);padding:12px 16px;color:var(--text);font-weight:600}
:root .w-skip:focus{top:8px}
:root .w-head{display:flex;flex-direction:row;flex-wrap:wrap;align-items:center;justify-content:space-between;gap:4px 24px;min-height:64px;padding-block:8px}
:root .w-mark{display:inline-flex;align-items:center;min-height:44px;text-decoration-line:none}
:root .w-mark-more{font-family:'Public Sans','Public Sans stand-in',system-ui,sans-serif;font-weight:400;font-size:.875rem;color:var(--quiet);margin-inline-start:10px}
:root .w-nav{display:flex;flex-direction:row;flex-wrap:wrap;gap:4px 28px;align-items:center;margin:0;padding:0;list-style:none}
:root .w-nav-link{display:inline-flex;align-items:center;min-height:44px;color:var(--text);text-decoration-line:none;font-size:1rem;line-height:1.3}
:root .w-nav-link:hover{text-decoration-line:underline;text-underline-offset:.25em}
:root .w-nav-link[aria-current=page]{color:var(--actionText);font-weight:700}
:root .w-basket{font-variant-numeric:tabular-nums lining-nums;white-space:nowrap}
:root .w-head-links{margin-inline-start:auto}
:root .w-strip{border-block:1px solid var(--line);overflow-x:auto;scrollbar-width:none}
:root .w-strip .w-nav{flex-wrap:nowrap;gap:24px}
:root .w-strip .w-nav-link{white-space:nowrap}
:root .w-foot{border-top:1px solid var(--line);margin-top:auto;padding-block:24px 40px}
:root .w-foot-columns{display:flex;flex-direction:column;gap:24px}
:root .w-foot-links{display:grid;grid-template-columns:repeat(auto-fill,minmax(min(100%,8.5rem),1fr));gap:0 32px;width:100%;max-width:20rem}
@media (min-width:760px){:root .w-foot-columns{flex-direction:row;justify-content:space-between;align-items:flex-start;gap:40px}}
@media print{:root .w-head,:root .w-foot,:root .w-strip,:root .w-skip{display:none}}
`;

const office = `
:root .w-office{display:flex;flex-direction:column;min-height:100dvh;background:var(--page)}
:root .w-office-side{display:none}
:root .w-office-main{flex:1 1 auto;min-width:0;padding:8px 20px 112px;display:flex;flex-direction:column;gap:24px;outline:none}
:root .w-office-top{display:flex;flex-direction:row;align-items:center;justify-content:space-between;gap:16px;padding:8px 20px;border-bottom:1px solid var(--line)}
:root .w-office-bar{position:fixed;inset:auto 0 0;z-index:5;display:flex;flex-direction:row;background:var(--page);border-top:3px solid var(--text);padding-bottom:env(safe-area-inset-bottom)}
:root .w-office-bar>*{flex:1 1 0;min-width:0;display:flex;align-items:center;justify-content:center;min-height:56px;padding:4px;font-size:.875rem;line-height:1.2;text-align:center;color:var(--text);text-decoration-line:none;border:0;border-radius:0;background:none;font-weight:400}
:root .w-office-bar>[aria-current=page]{color:var(--actionText);font-weight:700;box-shadow:inset 0 3px 0 var(--actionText)}
:root .w-office-list{display:flex;flex-direction:column;margin:0;padding:0;list-style:none}
:root .w-office-list .w-nav-link{display:flex}
:root .w-office-foot{margin-top:auto;padding-top:24px;display:flex;flex-direction:column;gap:8px}
@media (min-width:1000px){
:root .w-office{flex-direction:row;align-items:stretch}
:root .w-office-side{display:flex;flex-direction:column;flex:none;width:12.5rem;box-sizing:border-box;padding:16px 20px 24px;border-right:1px solid var(--line);position:sticky;top:0;height:100dvh;overflow-y:auto}
:root .w-office-side .w-nav-link{min-height:38px}
:root .w-office-main{padding:28px 32px 64px}
:root .w-office-top,:root .w-office-bar{display:none}
}
@media print{:root .w-office-side,:root .w-office-bar,:root .w-office-top{display:none}:root .w-office-main{padding:0}}
:root .w-titlebar{display:flex;flex-direction:row;flex-wrap:wrap;gap:12px 24px;align-items:flex-end;justify-content:space-between}
:root .w-titlebar-words{display:flex;flex-direction:column;gap:4px;min-width:0;flex:1 1 18rem}
:root .w-titlebar-do{display:flex;flex-direction:row;flex-wrap:wrap;gap:12px}
`;

/** The frames around every screen of the shop, the trade area and the office. */
export const shellCss = header + office;
