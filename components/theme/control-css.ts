const buttons = `
:root .w-button{display:inline-flex;flex-direction:row;align-items:center;justify-content:center;gap:8px;min-height:48px;min-width:48px;padding:10px 20px;box-sizing:border-box;border:1.5px solid var(--text);border-radius:3px;background:transparent;color:var(--text);font-family:'Public Sans','Public Sans stand-in',system-ui,sans-serif;font-weight:700;font-size:1.0625rem;line-height:1.25;text-align:center;text-decoration-line:none;cursor:pointer;user-select:none;white-space:normal}
:root .w-button-label{font:inherit;color:inherit;text-align:center}
:root .w-button-full{width:100%;min-height:52px}
:root .w-button-small{min-height:44px;min-width:44px;padding:8px 14px;font-size:.9375rem}
:root .w-button-primary{background:var(--action);border-color:var(--action);color:var(--onAction)}
:root .w-button-danger{border-color:var(--danger);color:var(--danger)}
:root .w-button-quiet:hover,:root .w-button-danger:hover{background:var(--panel)}
:root .w-button-primary:hover{background:color-mix(in srgb,var(--action) 88%,#000);border-color:color-mix(in srgb,var(--action) 88%,#000)}
:root .w-button:active{transform:translateY(1px)}
:root .w-button:disabled,:root .w-button[aria-disabled=true]{background:transparent;border:1.5px dashed var(--edge);color:var(--quiet);cursor:not-allowed;transform:none}
:root .w-button[aria-busy=true]{cursor:progress;opacity:.9}
:root .w-button-square{padding:0;width:48px;height:48px;flex:none}
:root .w-button-bare{border-color:transparent}
@media print{:root .w-button{display:none}}
`;

const fields = `
:root .w-field{display:flex;flex-direction:column;gap:6px;min-width:0;margin:0;padding:0;border:0}
:root .w-label{font-weight:600;font-size:1rem;line-height:1.4;color:var(--text);padding:0}
:root .w-optional{font-weight:400;color:var(--quiet)}
:root .w-hint{font-size:.875rem;line-height:1.45;color:var(--quiet)}
:root .w-error{font-size:.9375rem;line-height:1.4;font-weight:600;color:var(--danger);display:flex;gap:8px;align-items:baseline}
:root .w-error::before{content:'!';flex:none;width:1.15em;height:1.15em;border-radius:3px;background:var(--danger);color:var(--page);font-weight:700;line-height:1.15em;text-align:center;font-size:.875em}
:root .w-control{display:flex;flex-direction:row;align-items:stretch;min-height:48px;box-sizing:border-box;border:1.5px solid var(--edge);border-radius:3px;background:var(--page)}
:root .w-control-short{width:11rem;max-width:100%}
:root .w-control-cell{width:7rem;min-height:44px;max-width:100%}
:root .w-control:focus-within{outline:3px solid var(--text);outline-offset:1px}
:root .w-control-wrong{border-color:var(--danger);border-width:2px}
:root .w-input{flex:1 1 auto;width:100%;min-width:0;box-sizing:border-box;padding:10px 12px;border:0;background:transparent;color:var(--text);font:400 1.0625rem/1.4 'Public Sans','Public Sans stand-in',system-ui,sans-serif;font-variant-numeric:tabular-nums lining-nums;outline:none}
:root .w-input:focus-visible{outline:none}
:root .w-input::placeholder{color:var(--quiet)}
:root .w-input:disabled,:root .w-input:read-only:not(select){color:var(--quiet)}
:root .w-input-tall{min-height:7rem;resize:vertical}
:root .w-affix{display:flex;align-items:center;color:var(--quiet);font-size:1.0625rem;padding-inline:12px}
:root .w-affix+.w-input{padding-inline-start:0}
:root .w-input+.w-affix{padding-inline-start:0}
:root select.w-input{appearance:none;padding-inline-end:40px;cursor:pointer;text-overflow:ellipsis}
:root select.w-input option{background:var(--page);color:var(--text)}
:root .w-control-arrow{position:relative;width:0;display:flex;align-items:center;pointer-events:none}
:root .w-control-arrow .w-icon{position:absolute;right:12px}
:root .w-choice{display:flex;flex-direction:row;align-items:flex-start;gap:12px;min-height:44px;padding-block:9px;box-sizing:border-box;cursor:pointer;color:var(--text);font-size:1rem;line-height:1.5}
:root .w-choice input{appearance:none;flex:none;width:24px;height:24px;margin:1px 0 0;border:1.5px solid var(--edge);border-radius:3px;background:var(--page);cursor:pointer;display:grid;place-content:center}
:root .w-choice input[type=radio]{border-radius:50%}
:root .w-choice input:checked{border-color:var(--text);background:var(--text)}
:root .w-choice input:checked::before{content:'';width:6px;height:11px;border:solid var(--page);border-width:0 2.5px 2.5px 0;transform:translateY(-1.5px) rotate(45deg)}
:root .w-choice input[type=radio]:checked{background:var(--page);border-width:7px}
:root .w-choice input[type=radio]:checked::before{content:none}
:root .w-choice input:disabled{border-style:dashed;cursor:not-allowed}
:root .w-choice:has(input:disabled){color:var(--quiet);cursor:not-allowed}
:root .w-choice-words{flex:1 1 auto;min-width:0}
:root .w-choice-note{display:block;font-size:.875rem;line-height:1.45;color:var(--quiet)}
:root .w-choice-end{flex:none;text-align:end;font-variant-numeric:tabular-nums lining-nums}
:root .w-choices{display:flex;flex-direction:column}
:root .w-choices-ruled{border-top:1px solid var(--line)}
:root .w-choices-ruled>.w-choice{border-bottom:1px solid var(--line);padding-block:12px}
`;

const stepper = `
:root .w-stepper{display:inline-flex;flex-direction:row;align-items:center;border:1.5px solid var(--edge);border-radius:3px;align-self:flex-start}
:root .w-stepper .w-button{border:0;border-radius:2px}
:root .w-stepper-value{min-width:3.25rem;text-align:center;font-weight:700;font-size:1.0625rem;line-height:1.2;font-variant-numeric:tabular-nums lining-nums;color:var(--text)}
`;

/** How buttons and controls look in every state. */
export const controlCss = buttons + fields + stepper;
