const marks = `
:root .w-hook{display:block;flex:none;align-self:center;width:8px;height:6px;margin-top:9px;margin-bottom:2px;box-sizing:border-box;border:2px solid var(--text);border-top:0;border-radius:0 0 5px 5px;position:relative;print-color-adjust:exact}
:root .w-hook::before{content:'';position:absolute;right:-2px;bottom:3px;width:2px;height:11px;background:var(--text)}
:root .w-badge{display:inline-flex;flex-direction:row;align-items:center;gap:7px;font-family:'Public Sans','Public Sans stand-in',system-ui,sans-serif;font-size:.875rem;line-height:1.45;font-weight:600;font-variant-numeric:tabular-nums lining-nums;color:var(--text);white-space:nowrap}
:root .w-badge::before{content:'';flex:none;width:11px;height:11px;box-sizing:border-box;print-color-adjust:exact;forced-color-adjust:none}
:root .w-badge-free{color:var(--good)}
:root .w-badge-free::before{background:var(--free);border:1.5px solid var(--freeEdge)}
:root .w-badge-held{color:var(--waiting)}
:root .w-badge-held::before{background:repeating-linear-gradient(135deg,var(--heldHatch) 0 2px,var(--held) 2px 5px)}
:root .w-badge-sold::before{background:var(--sold)}
:root .w-badge-quiet{color:var(--quiet);font-weight:400}
:root .w-badge-quiet::before{border:1.5px solid var(--edge)}
`;

const notices = `
:root .w-notice{display:flex;flex-direction:row;background:var(--panel);border-radius:3px;overflow:hidden;align-items:stretch}
:root .w-notice-bar{flex:none;width:8px;print-color-adjust:exact;forced-color-adjust:none}
:root .w-notice-info{background:var(--text)}
:root .w-notice-good{background:var(--good)}
:root .w-notice-held{background:repeating-linear-gradient(135deg,var(--heldHatch) 0 3px,var(--held) 3px 8px)}
:root .w-notice-error{background:var(--danger)}
:root .w-notice-words{flex:1 1 0;min-width:0;padding:14px 16px;display:flex;flex-direction:column;gap:4px}
:root .w-notice-do{display:flex;flex-direction:row;flex-wrap:wrap;gap:12px;padding-top:8px;align-items:center}
`;

const tables = `
:root .w-table-frame{container-type:inline-size;container-name:table;width:100%;min-width:0}
:root .w-table{border-collapse:collapse;width:100%;font-size:1rem;line-height:1.45;color:var(--text);font-variant-numeric:tabular-nums lining-nums}
:root .w-table caption{text-align:start;padding-bottom:8px}
:root .w-table th,:root .w-table td{text-align:start;vertical-align:baseline;padding:11px 16px 11px 0;border-bottom:1px solid var(--line);font-weight:400}
:root .w-table th:last-child,:root .w-table td:last-child{padding-inline-end:0}
:root .w-table thead th{font-size:.8125rem;font-weight:600;letter-spacing:.03em;color:var(--quiet);border-bottom:1.5px solid var(--text);padding-block:8px;vertical-align:bottom}
:root .w-table tbody th{font-weight:600}
:root .w-table tfoot th,:root .w-table tfoot td{font-weight:700;border-bottom:0;border-top:1.5px solid var(--text)}
:root .w-table .w-cell-end{text-align:end}
:root .w-table .w-table-empty{color:var(--quiet);padding-block:20px}
@container table (max-width:559.98px){
:root .w-table,:root .w-table caption,:root .w-table tbody,:root .w-table tfoot,:root .w-table tr,:root .w-table th{display:block}
:root .w-table thead{position:absolute;width:1px;height:1px;overflow:hidden;clip-path:inset(50%)}
:root .w-table tr{border-bottom:1px solid var(--line);padding-block:12px}
:root .w-table thead+tbody>tr:first-child{border-top:1.5px solid var(--text)}
:root .w-table tbody th,:root .w-table tbody td,:root .w-table tfoot th,:root .w-table tfoot td{padding:2px 0;border:0;text-align:start}
:root .w-table td{display:flex;flex-direction:row;justify-content:space-between;gap:16px;align-items:baseline}
:root .w-table td[data-title]::before{content:attr(data-title);color:var(--quiet);flex:none;max-width:50%}
:root .w-table td .w-cell-value{text-align:end;min-width:0}
:root .w-table tfoot tr{border-bottom:0;border-top:1.5px solid var(--text)}
}
:root .w-definitions{display:flex;flex-direction:column;gap:8px;margin:0;width:100%}
:root .w-definition{display:flex;flex-direction:row;justify-content:space-between;align-items:baseline;gap:4px 16px;flex-wrap:wrap}
:root .w-definition dt{color:var(--quiet);min-width:0;flex:1 1 auto}
:root .w-definition dd{margin:0;text-align:end;font-variant-numeric:tabular-nums lining-nums;min-width:0;margin-inline-start:auto}
:root .w-definition-strong dt,:root .w-definition-strong dd{color:var(--text);font-weight:700}
:root .w-definitions-ruled{gap:0;border-top:1px solid var(--line)}
:root .w-definitions-ruled>.w-definition{border-bottom:1px solid var(--line);padding-block:12px}
:root .w-definitions-facts>.w-definition{display:grid;grid-template-columns:7.25rem minmax(0,1fr)}
@media (min-width:760px){:root .w-definitions-facts>.w-definition{grid-template-columns:11rem minmax(0,1fr)}}
:root .w-definitions-facts dd{text-align:start;margin:0}
:root .w-definitions-ruled dt{color:var(--text);font-weight:600}
`;

const waiting = `
:root .w-empty{display:flex;flex-direction:column;gap:12px;align-items:flex-start;padding-block:24px 32px}
:root .w-empty-line{display:flex;flex-direction:row;gap:28px;border-top:3px solid var(--text);padding-inline:18px;margin-bottom:8px}
:root .w-bones{display:flex;flex-direction:column;width:100%}
:root .w-bone{display:block;background:var(--panel);border-radius:3px}
:root .w-bones-lines{gap:8px}
:root .w-bones-lines .w-bone{height:1rem}
:root .w-bones-lines .w-bone:last-child{width:62%}
:root .w-bones-rows .w-bone{height:3.5rem;margin-block:16px;box-shadow:0 17px 0 -16px var(--line)}
:root .w-bones-block .w-bone{height:12rem}
:root .w-bones-rail{border-top:3px solid var(--line);padding-top:17px}
:root .w-bones-rail .w-bone{height:96px;margin-bottom:1.6rem}
`;

const sheets = `
:root .w-sheet{margin:auto 0 0;padding:0;border:0;width:100%;max-width:100%;max-height:92dvh;background:var(--page);color:var(--text);border-top:3px solid var(--text);overscroll-behavior:contain}
:root .w-sheet::backdrop{background:rgb(20 15 12/.55)}
:root .w-sheet-inner{display:flex;flex-direction:column;gap:16px;padding:16px 20px max(24px,env(safe-area-inset-bottom))}
:root .w-sheet-head{display:flex;flex-direction:row;align-items:center;justify-content:space-between;gap:16px}
:root .w-sheet-head .w-button{margin-inline-end:-12px}
:root .w-sheet-body{display:flex;flex-direction:column;gap:16px;min-width:0}
:root .w-sheet-foot{padding-top:8px}
@media (min-width:760px){:root .w-sheet{margin:auto;width:34rem;border:1px solid var(--edge);border-top:3px solid var(--text);border-radius:3px}:root .w-sheet-inner{padding:20px 28px 28px}}
:root .w-date{display:flex;flex-direction:row;flex-wrap:wrap;gap:6px 14px;align-items:center}
:root .w-date-words{color:var(--quiet);font-size:.9375rem}
`;

const tree = `
:root .w-tree,:root .w-tree ul{display:flex;flex-direction:column;margin:0;padding:0;list-style:none;min-width:0}
:root .w-tree{border-top:1px solid var(--line)}
:root .w-tree ul{padding-inline-start:16px}
:root .w-tree-node{display:grid;grid-template-columns:minmax(0,1fr) auto auto;gap:4px 12px;align-items:baseline;width:100%;min-height:44px;padding:10px 8px;box-sizing:border-box;border:0;border-bottom:1px solid var(--line);background:transparent;color:var(--text);font:inherit;text-align:start;cursor:pointer}
:root .w-tree-node:hover{background:var(--panel)}
:root .w-tree-node[aria-current=true]{font-weight:700;box-shadow:inset 4px 0 0 var(--text)}
:root .w-tree-figure{font-variant-numeric:tabular-nums lining-nums;color:var(--quiet);white-space:nowrap}
:root .w-tree-wrong{color:var(--danger);font-weight:700}
:root .w-columns-tree{display:grid;grid-template-columns:minmax(0,1fr);gap:24px}
@media (min-width:760px){:root .w-columns-tree{grid-template-columns:minmax(15rem,20rem) minmax(0,1fr);gap:40px;align-items:start}}
`;

/** How the parts of the kit look that show something: notices, tables, empty and waiting places, sheets, trees. */
export const kitCss = marks + notices + tables + waiting + sheets + tree;
