import { invalidRequest } from './faults.ts';

const mostMetadataKeys = 50;
const longestMetadataKey = 40;
const longestMetadataValue = 500;

type Range = { min: number; max: number };

/** Reads the parameters of one request, or of one bracketed part of it, and names what is wrong by its full path. */
export class Params {
  readonly #values: Map<string, unknown>;
  readonly #path: string;
  readonly #read = new Set<string>();
  readonly #parts: Params[] = [];

  constructor(source: unknown, path = '') {
    this.#values = new Map(source !== null && typeof source === 'object' ? Object.entries(source) : []);
    this.#path = path;
  }

  /** The name as the caller wrote it: line_items[0][quantity]. */
  path(name: string): string {
    return this.#path === '' ? name : `${this.#path}[${name}]`;
  }

  #value(name: string): unknown {
    this.#read.add(name);
    return this.#values.get(name);
  }

  isText(name: string): boolean {
    return typeof this.#values.get(name) === 'string';
  }

  text(name: string): string | null {
    const value = this.#value(name);
    if (value === undefined) return null;
    const param = this.path(name);
    if (typeof value !== 'string') throw invalidRequest(`Invalid string: ${param}`, { param });
    if (value !== '') return value;
    const message = `You passed an empty string for '${param}'. We assume empty values are an attempt to unset a parameter; however '${param}' cannot be unset.`;
    throw invalidRequest(message, { code: 'parameter_invalid_empty', param });
  }

  requiredText(name: string): string {
    return this.text(name) ?? this.#missing(name);
  }

  #missing(name: string): never {
    const param = this.path(name);
    throw invalidRequest(`Missing required param: ${param}.`, { code: 'parameter_missing', param });
  }

  oneOf<Choice extends string>(name: string, choices: readonly Choice[]): Choice | null {
    const value = this.text(name);
    if (value === null) return null;
    const choice = choices.find((known) => known === value);
    if (choice !== undefined) return choice;
    const param = this.path(name);
    throw invalidRequest(`Invalid ${param}: must be one of ${choices.join(', ')}`, { param });
  }

  flag(name: string): boolean {
    return this.oneOf(name, ['true', 'false']) === 'true';
  }

  integer(name: string, { min, max }: Range): number | null {
    const value = this.text(name);
    if (value === null) return null;
    const param = this.path(name);
    const fault = (message: string) => invalidRequest(message, { code: 'parameter_invalid_integer', param });
    if (!/^-?\d+$/.test(value)) throw fault(`Invalid integer: ${value}`);
    const number = Number(value);
    if (number < min) throw fault(`This value must be greater than or equal to ${min}.`);
    if (number > max) throw fault(`This value must be less than or equal to ${max}.`);
    return number;
  }

  requiredInteger(name: string, range: Range): number {
    return this.integer(name, range) ?? this.#missing(name);
  }

  part(name: string): Params | null {
    const value = this.#value(name);
    if (value === undefined) return null;
    const param = this.path(name);
    if (value === null || typeof value !== 'object') throw invalidRequest(`Invalid object: ${param}`, { param });
    return this.#keep(new Params(value, param));
  }

  requiredPart(name: string): Params {
    return this.part(name) ?? this.#missing(name);
  }

  #keep(part: Params): Params {
    this.#parts.push(part);
    return part;
  }

  #items(name: string): unknown[] {
    const value = this.#value(name);
    if (value === undefined) return [];
    const param = this.path(name);
    if (value === null || typeof value !== 'object') throw invalidRequest(`Invalid array: ${param}`, { param });
    return Object.values(value);
  }

  parts(name: string): Params[] {
    return this.#items(name).map((item, index) => this.#keep(new Params(item, `${this.path(name)}[${index}]`)));
  }

  texts(name: string): string[] {
    return this.#items(name).map((item) => {
      if (typeof item === 'string' && item !== '') return item;
      throw invalidRequest(`Invalid array: ${this.path(name)}`, { param: this.path(name) });
    });
  }

  /** A key that is given with an empty value is left out. */
  metadata(name = 'metadata'): Record<string, string> {
    const part = this.part(name);
    if (!part) return {};
    const keys = [...part.#values.keys()];
    const param = this.path(name);
    if (keys.length > mostMetadataKeys) {
      throw invalidRequest(`Metadata cannot have more than ${mostMetadataKeys} keys`, { param });
    }
    const pairs = keys.flatMap((key) => (part.#value(key) === '' ? [] : [[key, part.requiredText(key)] as const]));
    for (const [key, value] of pairs) {
      if (key.length <= longestMetadataKey && value.length <= longestMetadataValue) continue;
      const message = `Metadata keys have up to ${longestMetadataKey} characters and values up to ${longestMetadataValue}: ${key}`;
      throw invalidRequest(message, { param });
    }
    return Object.fromEntries(pairs);
  }

  /** Call it when all is read: what no one asked for is refused, misspelt names among it. */
  refuseUnknown(): void {
    for (const name of this.#values.keys()) {
      if (this.#read.has(name)) continue;
      const param = this.path(name);
      throw invalidRequest(`Received unknown parameter: ${param}`, { code: 'parameter_unknown', param });
    }
    for (const part of this.#parts) part.refuseUnknown();
  }
}
