/** A mail in the farm's own look: one column, real text, readable without images. Every value is escaped here. */
export type LetterPart =
  | { kind: 'heading'; text: string }
  | { kind: 'text'; text: string }
  | { kind: 'rows'; rows: [label: string, value: string][] }
  /** Amounts stand under each other at the right; the last one is their total. */
  | { kind: 'sums'; rows: [label: string, amount: string][] }
  | { kind: 'button'; text: string; url: string }
  /** A quiet way elsewhere, below the button. */
  | { kind: 'link'; text: string; url: string };

export function escapeHtml(text: string): string {
  const named: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };
  return text.replace(/[&<>"']/g, (character) => named[character] ?? character);
}

export function letterHtml(farmName: string, parts: LetterPart[]): string {
  const body = parts.map(partHtml).join('\n');
  return `<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(farmName)}</title></head>
<body style="margin:0;background:#FBF6F1;color:#1E1A18;font:16px/1.5 'Public Sans',Arial,sans-serif">
<div style="max-width:560px;margin:0 auto;padding:24px 20px;overflow-wrap:anywhere">
<p style="margin:0 0 20px;padding-bottom:10px;border-bottom:3px solid #1E1A18;font:700 20px Besley,Georgia,serif">${escapeHtml(farmName)}</p>
${body}
</div></body></html>`;
}

function partHtml(part: LetterPart): string {
  if (part.kind === 'heading')
    return `<h1 style="margin:0 0 12px;font:700 26px/1.2 Besley,Georgia,serif">${escapeHtml(part.text)}</h1>`;
  if (part.kind === 'text') return `<p style="margin:0 0 14px">${escapeHtml(part.text).replace(/\n/g, '<br>')}</p>`;
  if (part.kind === 'button') {
    const style =
      'display:inline-block;padding:12px 18px;border-radius:3px;background:#A8341F;color:#FFFFFF;font-weight:700;text-decoration:none';
    return `<p style="margin:18px 0"><a href="${escapeHtml(part.url)}" style="${style}">${escapeHtml(part.text)}</a></p>`;
  }
  if (part.kind === 'link') {
    return `<p style="margin:0 0 14px"><a href="${escapeHtml(part.url)}" style="color:#7F2415">${escapeHtml(part.text)}</a></p>`;
  }
  const rows = part.kind === 'sums' ? sumRows(part.rows) : part.rows.map(wordRow);
  return `<table style="width:100%;margin:0 0 16px;border-collapse:collapse">${rows.join('')}</table>`;
}

const CELL = 'border-top:1px solid #D9CDBF;vertical-align:top';

function wordRow([label, value]: [string, string]): string {
  const words = escapeHtml(value).replace(/\n/g, '<br>');
  return `<tr><th scope="row" style="${CELL};width:27%;text-align:left;padding:7px 12px 7px 0;font-weight:400;color:#5A514B">${escapeHtml(label)}</th><td style="${CELL};padding:7px 0">${words}</td></tr>`;
}

function sumRows(rows: [string, string][]): string[] {
  return rows.map(([label, amount], at) => {
    const weight = at === rows.length - 1 ? 'font-weight:700' : 'font-weight:400';
    return `<tr><th scope="row" style="${CELL};text-align:left;padding:7px 12px 7px 0;${weight}">${escapeHtml(label)}</th><td style="${CELL};padding:7px 0;text-align:right;white-space:nowrap;font-variant-numeric:tabular-nums;${weight}">${escapeHtml(amount)}</td></tr>`;
  });
}

export function letterText(farmName: string, parts: LetterPart[]): string {
  const lines = parts.map((part) => {
    if (part.kind === 'rows' || part.kind === 'sums')
      return part.rows.map(([label, value]) => `${label}: ${value.replace(/\n/g, ', ')}`).join('\n');
    return 'url' in part ? `${part.text}:\n${part.url}` : part.text;
  });
  return `${[...lines, farmName].join('\n\n')}\n`;
}
