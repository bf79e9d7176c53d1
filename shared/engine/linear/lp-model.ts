export type Term = readonly [coefficient: number, column: string];
export type ColumnKind = 'continuous' | 'integer' | 'binary';
type Column = { name: string; cost: number; lower: number; upper: number; kind: ColumnKind };
export type Row = { name: string; terms: readonly Term[]; sense: '<=' | '>=' | '='; right: number };
export type WriteOptions = {
  sense?: 'Maximize' | 'Minimize';
  /** Replaces the columns' own costs. */
  objective?: readonly Term[];
  /** Rows that only this text has. */
  extraRows?: readonly Row[];
  /** Lets every whole number be broken. */
  isRelaxed?: boolean;
  title?: string;
};

const LINE_LENGTH = 200;

/** Plain decimal with at most nine places: every solver's reader takes it, and grams as kilograms stay exact. */
function decimal(value: number): string {
  const text = value.toFixed(9).replace(/\.?0+$/, '');
  return text === '-0' ? '0' : text;
}

function signed(coefficient: number, column: string, isFirst: boolean): string {
  const size = Math.abs(coefficient);
  const body = size === 1 ? column : `${decimal(size)} ${column}`;
  if (isFirst) return coefficient < 0 ? `- ${body}` : body;
  return coefficient < 0 ? `- ${body}` : `+ ${body}`;
}

function wrap(words: readonly string[], indent: string): string {
  const lines: string[] = [];
  let line = indent;
  for (const word of words) {
    if (line.length + word.length + 1 > LINE_LENGTH) {
      lines.push(line);
      line = indent;
    }
    line += ` ${word}`;
  }
  return [...lines, line].join('\n');
}

/** Sums the coefficients of a column that is named twice and leaves out what cancels. */
function merged(terms: readonly Term[]): Term[] {
  const byColumn = new Map<string, number>();
  for (const [coefficient, column] of terms) byColumn.set(column, (byColumn.get(column) ?? 0) + coefficient);
  return [...byColumn]
    .filter(([, coefficient]) => Math.abs(coefficient) > 1e-12)
    .map(([column, each]) => [each, column]);
}

/** A linear model that is written as CPLEX LP text; the order of columns and rows is the order of adding. */
export class LpModel {
  private readonly columns = new Map<string, Column>();
  private readonly rows = new Map<string, Row>();
  private readonly comments: string[] = [];

  addComment(text: string): void {
    this.comments.push(text.replace(/\s+/g, ' '));
  }

  /** Returns the name, so that a term can be made on the spot. */
  addColumn(name: string, about: { cost?: number; lower?: number; upper?: number; kind?: ColumnKind } = {}): string {
    if (this.columns.has(name)) throw new RangeError(`column ${name} exists`);
    const { cost = 0, lower = 0, upper = Infinity, kind = 'continuous' } = about;
    this.columns.set(name, { name, cost, lower, upper: kind === 'binary' ? Math.min(1, upper) : upper, kind });
    return name;
  }

  hasColumn(name: string): boolean {
    return this.columns.has(name);
  }

  /** A row without terms is left out when it holds; when it cannot, it is kept on a column fixed at zero. */
  addRow(name: string, terms: readonly Term[], end: readonly [sense: Row['sense'], right: number]): void {
    if (this.rows.has(name)) throw new RangeError(`row ${name} exists`);
    const [sense, value] = end;
    const kept = merged(terms);
    if (kept.length > 0) {
      this.rows.set(name, { name, terms: kept, sense, right: value });
      return;
    }
    const holds = sense === '<=' ? value >= 0 : sense === '>=' ? value <= 0 : value === 0;
    if (holds) return;
    if (!this.columns.has('never')) this.addColumn('never', { upper: 0 });
    this.rows.set(name, { name, terms: [[1, 'never']], sense, right: value });
  }

  get size(): { columns: number; integers: number; rows: number } {
    const integers = [...this.columns.values()].filter(({ kind }) => kind !== 'continuous').length;
    return { columns: this.columns.size, integers, rows: this.rows.size };
  }

  write(about: WriteOptions = {}): string {
    const { sense = 'Maximize', title, extraRows = [], isRelaxed = false } = about;
    const costs: Term[] = [...this.columns.values()]
      .filter(({ cost }) => cost !== 0)
      .map(({ cost, name }) => [cost, name]);
    const objective = merged(about.objective ?? costs);
    return [
      ...(title ? [`\\ ${title}`] : []),
      ...this.comments.map((comment) => `\\ ${comment}`),
      sense,
      wrap(['value:', ...this.terms(objective)], ''),
      'Subject To',
      ...[...this.rows.values(), ...extraRows].map((row) => this.row(row)),
      ...this.bounds(isRelaxed),
      ...(isRelaxed ? [] : this.kinds('General', 'integer')),
      ...(isRelaxed ? [] : this.kinds('Binary', 'binary')),
      'End',
      '',
    ].join('\n');
  }

  private terms(terms: readonly Term[]): string[] {
    if (terms.length === 0) return [`0 ${this.columns.keys().next().value ?? 'never'}`];
    return terms.map(([coefficient, column], index) => signed(coefficient, column, index === 0));
  }

  private row({ name, terms, sense, right }: Row): string {
    return wrap([`${name}:`, ...this.terms(terms), `${sense} ${decimal(right)}`], '');
  }

  private bounds(isRelaxed: boolean): string[] {
    const lines = [...this.columns.values()].flatMap(({ name, lower, upper, kind }) => {
      if (lower === upper) return [` ${name} = ${decimal(lower)}`];
      if (kind === 'binary' && !isRelaxed) return [];
      if (lower === -Infinity && upper === Infinity) return [` ${name} free`];
      if (upper === Infinity) return lower === 0 ? [] : [` ${name} >= ${decimal(lower)}`];
      return [` ${decimal(lower)} <= ${name} <= ${decimal(upper)}`];
    });
    return lines.length > 0 ? ['Bounds', ...lines] : [];
  }

  private kinds(heading: string, kind: ColumnKind): string[] {
    const names = [...this.columns.values()].filter((column) => column.kind === kind).map(({ name }) => name);
    return names.length > 0 ? [heading, wrap(names, '')] : [];
  }
}
