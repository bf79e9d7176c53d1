import { searchSums } from './search-sums.mjs';

/**
 * Solves models in CPLEX LP text with HiGHS. Plain JavaScript, so that Node loads it in a worker thread without a
 * loader, whoever the parent is: node, tsx or vitest.
 */

const DEFAULT_GAP = 0.0001;
const DEFAULT_TIME_LIMIT_SECONDS = 60;
const PROGRESS_MILLISECONDS = 250;

/** The answer is repeatable byte for byte when the solve ends by gap or by nodes: one seed, one thread. */
function setOptions(model, options) {
  model.options.set({
    output_flag: false,
    random_seed: 0,
    mip_rel_gap: options.gap ?? DEFAULT_GAP,
    mip_abs_gap: 1e-6,
    time_limit: options.timeLimitSeconds ?? DEFAULT_TIME_LIMIT_SECONDS,
  });
  if (options.nodeLimit !== undefined) model.options.set({ mip_max_nodes: options.nodeLimit });
}

function readModel(highs, lpText) {
  const model = highs.createModel({ format: 'lp', data: lpText });
  const { numCols } = model.getDimensions();
  if (numCols > 0) return { model, names: Array.from({ length: numCols }, (_, index) => model.getColName(index)) };
  model.dispose();
  throw new Error('the model has no columns');
}

/** Presolve may leave open whether a model is infeasible or unbounded: without it the answer is plain. */
function run(highs, model, callbacks) {
  model.run(callbacks);
  if (model.getModelStatus() !== highs.constants.modelStatus.unboundedOrInfeasible) return;
  model.options.set({ presolve: 'off' });
  model.run(callbacks);
}

function statusOf(highs, code) {
  const status = highs.constants.modelStatus;
  if (code === status.optimal || code === status.empty) return 'optimal';
  if (code === status.infeasible) return 'infeasible';
  if (code === status.unbounded) return 'unbounded';
  const limits = [status.timeLimit, status.iterationLimit, status.solutionLimit, status.interrupt];
  return limits.includes(code) ? 'limit' : 'failed';
}

const FEASIBLE = 2;

function readSolution(highs, model, about) {
  const code = model.getModelStatus();
  const status = statusOf(highs, code);
  if (status === 'failed' || status === 'unbounded')
    throw new Error(`the solver ended with status ${code} (${status})`);
  const hasAnswer = status !== 'infeasible' && model.info.get('primal_solution_status') === FEASIBLE;
  const values = hasAnswer ? model.getSolution().colValue : [];
  const gap = about.isInteger ? model.info.get('mip_gap') : 0;
  return {
    status,
    hasAnswer,
    objective: hasAnswer ? model.getObjectiveValue() : 0,
    gap: hasAnswer && Number.isFinite(gap) ? Math.max(0, gap) : hasAnswer ? 0 : 1,
    columns: Object.fromEntries(Array.from(values, (value, index) => [about.names[index], value])),
    nodes: about.isInteger ? Math.max(0, Number(model.info.get('mip_node_count'))) : 0,
    milliseconds: Math.round(performance.now() - about.startedAt),
  };
}

/** Reports at most a few times a second. */
function atIntervals(report) {
  let reportedAt = -Infinity;
  return (progress) => {
    const now = performance.now();
    if (!report || now - reportedAt < PROGRESS_MILLISECONDS) return;
    reportedAt = now;
    report(progress());
  };
}

function progressCallbacks(highs, report) {
  if (!report) return undefined;
  const atTimes = atIntervals(report);
  return {
    [highs.constants.callbackType.mipInterrupt]({ data }) {
      const best = data.mip_primal_bound;
      atTimes(() => ({
        milliseconds: Math.round((data.running_time ?? 0) * 1000),
        nodes: Number(data.mip_node_count ?? 0),
        best: best !== undefined && Math.abs(best) < 1e29 ? best : null,
        bound: data.mip_dual_bound ?? 0,
      }));
    },
  };
}

/** Marks a known answer as the place to begin; columns that it does not name begin at zero. */
function setStart(model, names, start) {
  model.setSolution({ colValue: Float64Array.from(names, (name) => start[name] ?? 0) });
}

/** The same question by a search that branches on sums of columns first: see `searchSums`. */
function solveBySums(highs, { model, names, startedAt }, { options, report }) {
  const places = new Map(names.map((name, index) => [name, index]));
  const sign = model.getObjectiveSense() === highs.constants.objectiveSense.maximize ? 1 : -1;
  const gap = options.gap ?? DEFAULT_GAP;
  const limit = (options.timeLimitSeconds ?? DEFAULT_TIME_LIMIT_SECONDS) * 1000;
  const milliseconds = () => Math.round(performance.now() - startedAt);
  const turned = (key) => (Number.isFinite(key) ? sign * key : null);
  const atTimes = atIntervals(report);
  const { best, bound, nodes, isStopped } = searchSums(highs, model, {
    sums: options.sumsFirst.map((columns) => columns.flatMap((name) => places.get(name) ?? [])),
    sign,
    gap,
    start: options.start && names.map((name) => options.start[name] ?? 0),
    isOver: (count) => milliseconds() > limit || count > (options.nodeLimit ?? Infinity),
    report: (at) =>
      atTimes(() => ({
        milliseconds: milliseconds(),
        nodes: at.nodes,
        best: turned(at.best),
        bound: turned(at.bound) ?? 0,
      })),
  });
  const proven = best ? Math.max(0, bound - best.key) / Math.max(1, Math.abs(best.key)) : 1;
  const isSettled = best ? proven <= gap * (1 + 1e-9) : !isStopped && bound === -Infinity;
  return {
    status: isSettled ? (best ? 'optimal' : 'infeasible') : 'limit',
    hasAnswer: best !== null,
    objective: best ? sign * best.key : 0,
    gap: proven,
    columns: Object.fromEntries(Array.from(best?.columns ?? [], (value, index) => [names[index], value])),
    nodes,
    milliseconds: milliseconds(),
  };
}

export function solveModel(highs, task, report) {
  const startedAt = performance.now();
  const { model, names } = readModel(highs, task.lpText);
  try {
    setOptions(model, task.options);
    if (task.options.sumsFirst && hasIntegers(task.lpText)) {
      return solveBySums(highs, { model, names, startedAt }, { options: task.options, report });
    }
    if (task.options.start) setStart(model, names, task.options.start);
    run(highs, model, progressCallbacks(highs, report));
    return readSolution(highs, model, { startedAt, names, isInteger: hasIntegers(task.lpText) });
  } finally {
    model.dispose();
  }
}

function hasIntegers(lpText) {
  return /^\s*(generals?|gen|binar(y|ies)|bin)\s*$/im.test(lpText);
}

/** Each variation begins from the model as written; the basis of the one before keeps it warm. */
export function solveVariations(highs, task) {
  const { model, names } = readModel(highs, task.lpText);
  try {
    setOptions(model, task.options);
    const isInteger = hasIntegers(task.lpText);
    const lp = model.getLp();
    return task.variations.map((changes) => {
      const startedAt = performance.now();
      const rows = changes.map((change) => ({ ...change, index: model.getRowByName(change.row) }));
      for (const { index, lower, upper } of rows) {
        model.changeRowBounds(index, lower ?? -highs.infinity, upper ?? highs.infinity);
      }
      model.zeroAllClocks();
      run(highs, model);
      const solution = readSolution(highs, model, { startedAt, names, isInteger });
      for (const { index } of rows) model.changeRowBounds(index, lp.rowLower[index], lp.rowUpper[index]);
      return solution;
    });
  } finally {
    model.dispose();
  }
}
