export type JsonObject = { [name: string]: Json };
export type Json = null | boolean | number | string | Json[] | JsonObject;

/** A deep copy as the wire carries it: members that are undefined are left out. */
export function toJson(value: unknown): Json {
  if (value === null || value === undefined) return null;
  if (typeof value === 'boolean' || typeof value === 'number' || typeof value === 'string') return value;
  if (Array.isArray(value)) return value.map(toJson);
  if (typeof value !== 'object') throw new TypeError(`A ${typeof value} has no place in an answer`);
  const members: [string, unknown][] = Object.entries(value);
  return Object.fromEntries(
    members.flatMap(([name, member]) => (member === undefined ? [] : [[name, toJson(member)]])),
  );
}

/** The same text for the same content, in whatever order it was sent. */
export function canonicalText(value: Json): string {
  if (Array.isArray(value)) return `[${value.map(canonicalText).join(',')}]`;
  if (value === null || typeof value !== 'object') return JSON.stringify(value);
  const members = Object.keys(value).sort();
  return `{${members.map((name) => `${JSON.stringify(name)}:${canonicalText(value[name] ?? null)}`).join(',')}}`;
}
