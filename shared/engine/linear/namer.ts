const PLAIN = /^[a-z][a-z0-9-]*$/;

/**
 * Short names for rows and columns that every solver's reader takes. An id that is short and plain stays readable;
 * another becomes its kind and a number, and `legend` says what the number stands for.
 */
export class Namer {
  private readonly names = new Map<string, string>();
  private readonly taken = new Set<string>();
  readonly legend: string[] = [];

  name(kind: string, id: string): string {
    const key = `${kind} ${id}`;
    const known = this.names.get(key);
    if (known) return known;
    const plain = id.replaceAll('-', '_');
    const isPlain = PLAIN.test(id) && id.length <= 24 && !this.taken.has(`${kind} ${plain}`);
    const name = isPlain ? plain : this.numbered(kind);
    if (!isPlain) this.legend.push(`${name} = ${id}`);
    this.names.set(key, name);
    this.taken.add(`${kind} ${name}`);
    return name;
  }

  private numbered(kind: string): string {
    let number = 1;
    while (this.taken.has(`${kind} ${kind}${number}`)) number += 1;
    return `${kind}${number}`;
  }
}
