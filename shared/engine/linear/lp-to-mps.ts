type Sense = '<=' | '>=' | '=';
type Entry = { row: string; coefficient: number };
type Column = { name: string; entries: Entry[]; lower: number; upper: number; isWhole: boolean };
type ReadRow = { name: string; sense: Sense; right: number };
type Read = { isMaximum: boolean; columns: Map<string, Column>; rows: ReadRow[]; objective: string };

const HEADINGS = ['Maximize', 'Minimize', 'Subject To', 'Bounds', 'General', 'Binary', 'End'];
const MPS_SENSE = { '<=': 'L', '>=': 'G', '=': 'E' } as const;

/** Lines under each heading; comments are left out. */
function sections(lpText: string): Map<string, string[]> {
  const found = new Map<string, string[]>();
  let lines: string[] = [];
  for (const line of lpText.split('\n')) {
    if (line.startsWith('\\') || line.trim() === '') continue;
    if (HEADINGS.includes(line)) found.set(line, (lines = []));
    else lines.push(line);
  }
  return found;
}

function words(lines: readonly string[] | undefined): string[] {
  return (lines ?? []).join(' ').split(/\s+/).filter(Boolean);
}

function isSense(word: string): word is Sense {
  return word === '<=' || word === '>=' || word === '=';
}

function columnOf(read: Read, name: string): Column {
  const known = read.columns.get(name);
  if (known) return known;
  const column = { name, entries: [], lower: 0, upper: Infinity, isWhole: false };
  read.columns.set(name, column);
  return column;
}

/** Rows (and the objective, a row without an end) as the words of the text: `name: - 2 x + y <= 4`. */
function readRows(read: Read, text: readonly string[]): string[] {
  const names: string[] = [];
  let row = '';
  let coefficient = 1;
  for (let place = 0; place < text.length; place += 1) {
    const word = text[place] ?? '';
    if (word.endsWith(':')) {
      row = word.slice(0, -1);
      names.push(row);
      coefficient = 1;
    } else if (isSense(word)) {
      read.rows.push({ name: row, sense: word, right: Number(text[(place += 1)]) });
    } else if (word === '+' || word === '-') coefficient = word === '-' ? -1 : 1;
    else if (/^[\d.]/.test(word)) coefficient *= Number(word);
    else {
      columnOf(read, word).entries.push({ row, coefficient });
      coefficient = 1;
    }
  }
  return names;
}

function readBound(read: Read, line: string): void {
  const [first = '', sense, second = '', , third] = line.trim().split(/\s+/);
  if (sense === 'free') {
    Object.assign(columnOf(read, first), { lower: -Infinity });
  } else if (third !== undefined) {
    Object.assign(columnOf(read, second), { lower: Number(first), upper: Number(third) });
  } else if (sense === '=') {
    Object.assign(columnOf(read, first), { lower: Number(second), upper: Number(second) });
  } else if (sense === '>=') {
    Object.assign(columnOf(read, first), { lower: Number(second) });
  }
}

function readLp(lpText: string): Read {
  const found = sections(lpText);
  const isMaximum = found.has('Maximize');
  const read: Read = { isMaximum, columns: new Map(), rows: [], objective: '' };
  read.objective = readRows(read, words(found.get(isMaximum ? 'Maximize' : 'Minimize')))[0] ?? 'value';
  readRows(read, words(found.get('Subject To')));
  for (const line of found.get('Bounds') ?? []) readBound(read, line);
  for (const name of words(found.get('General'))) columnOf(read, name).isWhole = true;
  for (const name of words(found.get('Binary'))) {
    const column = columnOf(read, name);
    Object.assign(column, { isWhole: true, upper: Math.min(1, column.upper) });
  }
  return read;
}

function decimal(value: number): string {
  return value.toFixed(9).replace(/\.?0+$/, '');
}

function boundLines({ name, lower, upper, isWhole }: Column): string[] {
  if (lower === upper) return [` FX LIMIT ${name} ${decimal(lower)}`];
  if (lower === -Infinity && upper === Infinity) return [` FR LIMIT ${name}`];
  return [
    ...(lower === 0 ? [] : [` LO LIMIT ${name} ${decimal(lower)}`]),
    ...(upper === Infinity ? [] : [` UP LIMIT ${name} ${decimal(upper)}`]),
    // Some readers take a whole column without an upper limit for a yes or no.
    ...(isWhole && upper === Infinity ? [` PL LIMIT ${name}`] : []),
  ];
}

function columnLines(columns: readonly Column[], sign: (row: string) => 1 | -1): string[] {
  return columns.flatMap(({ name, entries }) =>
    entries.map(({ row, coefficient }) => `    ${name} ${row} ${decimal(sign(row) * coefficient)}`),
  );
}

/**
 * The same model as free-format MPS, which nearly every solver reads. It takes the LP text that `LpModel` writes, not the
 * whole of that language. MPS always seeks the least: where the text seeks the greatest, the objective is written with its
 * sign turned, and a comment says so.
 */
export function lpToMps(lpText: string): string {
  const read = readLp(lpText);
  const { objective } = read;
  const sign = (row: string) => (row === objective && read.isMaximum ? -1 : 1);
  const columns = [...read.columns.values()];
  const whole = columns.filter(({ isWhole }) => isWhole);
  const plain = columns.filter(({ isWhole }) => !isWhole);
  const bounds = columns.flatMap(boundLines);
  return [
    ...lpText.split('\n').flatMap((line) => (line.startsWith('\\') ? [`*${line.slice(1)}`] : [])),
    ...(read.isMaximum ? [`* The least of ${objective} with its sign turned is the greatest of it.`] : []),
    'NAME model',
    'ROWS',
    ` N ${objective}`,
    ...read.rows.map(({ name, sense }) => ` ${MPS_SENSE[sense]} ${name}`),
    'COLUMNS',
    ...columnLines(plain, sign),
    ...(whole.length > 0 ? ["    WHOLE 'MARKER' 'INTORG'"] : []),
    ...columnLines(whole, sign),
    ...(whole.length > 0 ? ["    WHOLE_END 'MARKER' 'INTEND'"] : []),
    'RHS',
    ...read.rows.filter(({ right }) => right !== 0).map(({ name, right }) => `    RIGHT ${name} ${decimal(right)}`),
    ...(bounds.length > 0 ? ['BOUNDS', ...bounds] : []),
    'ENDATA',
    '',
  ].join('\n');
}
