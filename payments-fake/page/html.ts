export type Html = { readonly markup: string };

const escapes: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

type Value = Html | Html[] | string | number | null;

function render(value: Value): string {
  if (value === null) return '';
  if (Array.isArray(value)) return value.map((part) => part.markup).join('');
  if (typeof value === 'object') return value.markup;
  return String(value).replace(/[&<>"']/g, (sign) => escapes[sign] ?? sign);
}

/** Every value that is not markup itself is escaped. */
export function html(texts: TemplateStringsArray, ...values: Value[]): Html {
  return { markup: texts.reduce((all, text, place) => all + render(values[place - 1] ?? null) + text) };
}

export function raw(markup: string): Html {
  return { markup };
}
