const drawings = `
:root .w-drawing{display:block;flex:none;overflow:visible}
:root .w-drawing-flesh{fill:color-mix(in srgb,var(--action) 62%,var(--page))}
:root .w-drawing-fat{fill:color-mix(in srgb,var(--held) 45%,var(--page))}
:root .w-drawing-plain{fill:var(--panel)}
:root .w-drawing-pen{fill:none;stroke:var(--text);stroke-width:1.8;stroke-linecap:round;stroke-linejoin:round}
:root .w-drawing-thin{stroke-width:1.3;opacity:.75}
@media print{:root .w-drawing{display:none}}
`;

const goods = `
:root .w-goods{display:grid;grid-template-columns:minmax(0,1fr);column-gap:56px;margin:0;padding:0;border:0 solid var(--line);border-top-width:1px}
:root .w-good{position:relative;display:grid;grid-template-columns:minmax(0,1fr) auto;gap:2px 16px;align-items:baseline;padding-block:20px;border:0 solid var(--line);border-bottom-width:1px}
:root .w-good>:nth-child(even){justify-self:end;text-align:end}
:root .w-good-go{position:static}
:root .w-good-go::after{content:'';position:absolute;inset:0}
:root .w-good:hover .w-good-go{text-decoration-line:underline}
@media (min-width:760px){:root .w-goods{grid-template-columns:minmax(0,1fr) minmax(0,1fr)}}
`;

const hero = `
:root .w-hero{display:flex;flex-direction:column;gap:10px;min-width:0}
:root .w-sections{display:flex;flex-direction:column;gap:48px;min-width:0}
:root .w-section{display:flex;flex-direction:column;gap:14px;min-width:0}
:root .w-hero+.rail{margin-top:8px}
:root .w-prose{display:flex;flex-direction:column;gap:12px;max-width:38rem}
:root .w-steps{display:grid;grid-template-columns:minmax(0,1fr);gap:24px 48px;margin:0;padding:0;list-style:none}
:root .w-step{display:grid;grid-template-columns:72px minmax(0,1fr);gap:4px 16px;align-items:start;align-content:start}
:root .w-step-words{display:flex;flex-direction:column;gap:4px;min-width:0}
@media (min-width:760px){
:root .w-sections{gap:72px}
:root .w-hero{gap:14px}
:root .w-steps{grid-template-columns:repeat(3,minmax(0,1fr))}
:root .w-step{grid-template-columns:minmax(0,1fr)}
}
`;

const box = `
:root .w-inside{display:flex;flex-direction:column;margin:0;padding:0;border:0 solid var(--line);border-top-width:1px}
:root .w-inside-line{display:grid;grid-template-columns:56px minmax(0,1fr) auto;gap:2px 14px;align-items:center;padding-block:12px;border:0 solid var(--line);border-bottom-width:1px}
:root .w-inside-words{display:flex;flex-direction:column;gap:2px;min-width:0}
:root .w-buy{display:flex;flex-direction:column;gap:14px;min-width:0}
:root .w-buy-price{display:flex;flex-direction:row;flex-wrap:wrap;align-items:baseline;gap:2px 10px}
:root .w-buy-count{display:flex;flex-direction:row;align-items:center;justify-content:space-between;gap:16px}
:root .w-buy-end{margin-inline-start:auto}
@media (min-width:760px){:root .w-stay{position:sticky;top:24px;align-self:start}}
`;

const choices = `
:root .w-label-chips{padding-bottom:8px}
:root .w-chips{display:flex;flex-direction:row;flex-wrap:wrap;gap:8px;border:0;margin:0;padding:0;min-width:0}
:root .w-chip{display:inline-flex;align-items:center;min-height:44px;padding:6px 14px;box-sizing:border-box;border:1.5px solid var(--edge);border-radius:3px;color:var(--text);font-size:1rem;line-height:1.25;cursor:pointer;position:relative;font-variant-numeric:tabular-nums lining-nums}
:root .w-chip input{position:absolute;inset:0;opacity:0;margin:0;width:100%;height:100%;cursor:pointer}
:root .w-chip:has(input:checked){border-color:var(--text);background:var(--text);color:var(--page);font-weight:600}
:root .w-chip:has(input:focus-visible){outline:3px solid var(--text);outline-offset:2px}
:root .w-chip:has(input:disabled){border-style:dashed;color:var(--quiet);cursor:not-allowed}
:root .w-chip:has(input:disabled) input{cursor:not-allowed}
:root .w-chip-note{font-size:.8125rem;margin-inline-start:.5em;font-weight:400}
:root .w-slots{display:grid;grid-template-columns:repeat(auto-fill,minmax(8.75rem,1fr));gap:8px}
:root .w-slots .w-chip{flex-direction:column;align-items:flex-start;justify-content:center;padding-block:8px}
:root .w-slots .w-chip-note{margin:0}
`;

const cuts = `
:root .w-cut{display:grid;grid-template-columns:64px minmax(0,1fr) auto;gap:4px 14px;align-items:start;padding-block:16px;border:0 solid var(--line);border-bottom-width:1px}
:root .w-cut-words{grid-column:2/-1;min-width:0}
:root .w-cut>.w-drawing{grid-row:1/3}
:root .w-cut-price{display:flex;flex-direction:column;align-items:flex-end;gap:2px;text-align:end}
:root .w-cut-buy{grid-column:2/-1;display:flex;flex-direction:row;flex-wrap:wrap;align-items:center;justify-content:space-between;gap:8px 16px;min-height:48px}
:root .w-stick{position:sticky;bottom:0;z-index:3;background:var(--page);border:0 solid var(--line);border-top-width:1px;padding-block:12px max(12px,env(safe-area-inset-bottom));margin-top:auto}
@media (min-width:760px){:root .w-cuts{display:grid;grid-template-columns:minmax(0,1fr) minmax(0,1fr);column-gap:56px}}
`;

const basket = `
:root .w-rows-plain{display:flex;flex-direction:column;margin:0;padding:0;border:0 solid var(--line);border-top-width:1px}
:root .w-item{display:grid;grid-template-columns:minmax(0,1fr) auto;gap:8px 16px;align-items:center;padding-block:16px;border:0 solid var(--line);border-bottom-width:1px}
:root .w-item-words{display:flex;flex-direction:column;gap:2px;min-width:0;align-self:start}
:root .w-item-price{align-self:start;align-items:flex-end;text-align:end}
:root .w-item-news{grid-column:1/-1}
:root .w-item-do{display:flex;flex-direction:row;align-items:center;gap:4px 8px;flex-wrap:wrap}
:root .w-item-end{justify-self:end}
:root .w-total{display:flex;flex-direction:row;justify-content:space-between;align-items:baseline;gap:16px;padding-top:4px}
`;

const orders = `
:root .w-form{display:flex;flex-direction:column;gap:40px;min-width:0;margin:0}
:root .w-way{display:flex;flex-direction:column;margin:0;padding:0;list-style:none}
:root .w-way-stop{display:grid;grid-template-columns:20px minmax(0,1fr);gap:2px 14px;padding-bottom:18px;position:relative}
:root .w-way-stop:last-child{padding-bottom:0}
:root .w-way-stop::before{content:'';width:14px;height:14px;box-sizing:border-box;border:2px solid var(--edge);border-radius:50%;background:var(--page);margin:5px 0 0 1px;z-index:1;print-color-adjust:exact}
:root .w-way-stop::after{content:'';position:absolute;left:7px;top:14px;bottom:-8px;width:2px;background:var(--line)}
:root .w-way-stop:last-child::after{content:none}
:root .w-way-done::before{background:var(--good);border-color:var(--good)}
:root .w-way-done::after{background:var(--good)}
:root .w-way-now::before{border-color:var(--text);border-width:4px}
:root .w-way-words{display:flex;flex-direction:column;gap:1px;min-width:0}
:root .w-code{font-variant-numeric:tabular-nums;letter-spacing:.04em}
`;

// Letters at twice their size leave room for one column: measured in letters, not in pixels.
const large = `
:root .w-shell>.w-main>*{container-type:inline-size;container-name:page}
@container page (max-width:16rem){
:root .w-good,:root .w-inside-line,:root .w-cut,:root .w-item,:root .w-step,:root .w-definitions-facts>.w-definition{grid-template-columns:minmax(0,1fr)}
:root .w-good>:nth-child(even),:root .w-item-price,:root .w-item-end{justify-self:start;text-align:start;align-items:flex-start}
:root .w-cut-words,:root .w-cut-buy{grid-column:auto}
:root .w-cut>.w-drawing{grid-row:auto}
:root .w-cut-price{align-items:flex-start;text-align:start}
}
`;

/** How the parts of the shop's pages look: goods on the counter, what is inside a box, slots, the way of an order. */
export const shopCss = drawings + goods + hero + box + choices + cuts + basket + orders + large;
