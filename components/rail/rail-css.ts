/** Labels are as long as 30 half-ems at most; a longer one never fits and is named on tap. */
const LONGEST_HALF_EMS = 30;

const hatch = (paper: string, line: string) => `repeating-linear-gradient(135deg,${line} 0 2px,${paper} 2px 7px)`;

const frame = `
:root .rail{container-type:inline-size;container-name:rail;display:flex;flex-direction:column;gap:10px;width:100%;margin:0;min-width:0}
:root .rail-line{border:0 solid var(--text);border-top-width:3px;display:flex;flex-direction:row;gap:3px;min-width:0;align-items:stretch}
:root .rail-narrow{display:none}
@container rail (max-width:419.98px){:root .rail-narrow{display:flex}:root .rail-wide{display:none}}
:root .rail-primal{display:flex;flex-direction:column;align-items:stretch;flex:1 1 0;min-width:0;padding:0;margin:0;border:0;background:none;cursor:pointer;container-type:inline-size;font-size:.75rem;touch-action:manipulation}
:root .rail-bar{display:flex;flex-direction:column;height:62px;background:var(--page);position:relative;overflow:hidden;print-color-adjust:exact;forced-color-adjust:none}
:root .rail-tall .rail-bar{height:96px}
@container rail (min-width:760px){:root .rail-tall .rail-bar{height:132px}}
:root .rail-sold{background:var(--sold);flex:none}
:root .rail-held{background:${hatch('var(--held)', 'var(--heldHatch)')};flex:none}
:root .rail-free{background:var(--free);flex:1 0 0;box-shadow:inset 0 0 0 1px var(--freeEdge)}
:root .rail-rest{background:var(--panel);flex:1 0 0;box-shadow:inset 0 0 0 1px var(--edge)}
:root .rail-primal:hover .rail-bar{box-shadow:0 0 0 1px var(--text)}
:root .rail-primal:focus-visible{outline-offset:1px;z-index:2}
:root .rail-chosen .rail-bar{box-shadow:0 0 0 3px var(--text)}
:root .rail-chosen{z-index:1}
:root .rail-label{font-family:'Public Sans','Public Sans stand-in',system-ui,sans-serif;height:1.35em;margin-top:5px;line-height:1.35;font-size:1em;color:var(--quiet);text-align:center;white-space:nowrap;overflow:visible;display:flex;flex-direction:row;justify-content:center}
:root .rail-chosen .rail-label{color:var(--text);font-weight:700}
:root .rail-label>span{display:none}
`;

// A label is shown where its column is wide enough for it, whatever the width of the page or the size of the letters.
const labels = Array.from({ length: LONGEST_HALF_EMS }, (_, at) => at + 1)
  .map(
    (n) =>
      `@container (min-width:${n / 2}em){:root .rail-label>.rail-fit-${n}{display:inline}:root .rail-label>.rail-else-${n}{display:none}}`,
  )
  .join('\n');

const beside = `
:root .rail-legend{display:flex;flex-direction:row;flex-wrap:wrap;gap:4px 20px;align-items:center;margin:0;padding:0}
:root .rail-key{display:flex;flex-direction:row;align-items:center;gap:7px;font-size:.875rem;line-height:1.45;color:var(--quiet)}
:root .rail-swatch{display:block;width:16px;height:16px;flex:none;print-color-adjust:exact;forced-color-adjust:none}
:root .rail-named{display:flex;flex-direction:row;align-items:center;gap:4px;border:0 solid var(--line);border-block-width:1px}
:root .rail-named-words{flex:1 1 auto;min-width:0;text-align:center;padding-block:6px}
`;

const motion = `
@media (prefers-reduced-motion:no-preference){:root .rail-sold,:root .rail-held{transition:height .45s cubic-bezier(.2,.7,.2,1)}}
`;

const paper = `
@media print{
:root .rail-sold{background:#000}
:root .rail-held{background:${hatch('#fff', '#000')}}
:root .rail-free,:root .rail-rest{background:#fff;box-shadow:inset 0 0 0 1px #000}
:root .rail{break-inside:avoid}
:root .rail-named{display:none}
}
`;

/** How the rail hangs, fills, labels itself, moves and prints. Goes into the page's head after the kit's rules. */
export const railCss = frame + labels + beside + motion + paper;
