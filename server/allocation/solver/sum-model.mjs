/** A value this near to a whole number is one: the solver's own tolerance. */
const WHOLE = 1e-6;
const FEASIBLE = 2;
/** The solver writes 'no answer yet' as a number beyond this. */
const HUGE = 1e29;

export function isWhole(value) {
  return Math.abs(value - Math.round(value)) < WHOLE;
}

/**
 * A model whose whole numbers can be taken away and given back, with one more row for each sum that is branched on.
 * A node is a limit for every sum and a value for some columns. Keys are objectives turned so that greater is better.
 */
export class SumModel {
  constructor(highs, model, { sums, sign }) {
    this.highs = highs;
    this.model = model;
    this.sign = sign;
    const { colLower, colUpper, numRows } = { ...model.getLp(), ...model.getDimensions() };
    this.lower = colLower;
    this.upper = colUpper;
    this.firstRow = numRows;
    const types = Array.from(colLower, (_, column) => model.getColIntegrality(column));
    this.whole = types.flatMap((type, column) => (type === 0 ? [] : [column]));
    this.types = this.whole.map((column) => types[column]);
    this.choices = this.whole.filter((column) => colUpper[column] - colLower[column] === 1);
    for (const columns of sums) {
      const entries = { indices: Int32Array.from(columns), values: Float64Array.from(columns, () => 1) };
      model.addRow(-highs.infinity, highs.infinity, entries);
    }
    this.limits = sums.map(() => [-highs.infinity, highs.infinity]);
    this.fixed = new Map();
    this.basis = null;
    model.clearIntegrality();
  }

  root() {
    return { limits: [...this.limits], fixed: new Map() };
  }

  place({ limits, fixed }) {
    for (const [index, [lower, upper]] of limits.entries()) {
      const [low, high] = this.limits[index];
      if (low !== lower || high !== upper) this.model.changeRowBounds(this.firstRow + index, lower, upper);
    }
    for (const column of this.fixed.keys()) if (!fixed.has(column)) this.free(column);
    for (const [column, value] of fixed) {
      if (this.fixed.get(column) !== value) this.model.changeColBounds(column, value, value);
    }
    this.limits = limits;
    this.fixed = fixed;
  }

  free(column) {
    this.model.changeColBounds(column, this.lower[column], this.upper[column]);
  }

  /** The node's linear program, warm from the one before. Null when nothing satisfies it. */
  relax(node) {
    const { model, highs } = this;
    this.place(node);
    model.run();
    const { optimal, infeasible, unboundedOrInfeasible, timeLimit } = highs.constants.modelStatus;
    if (![optimal, infeasible, unboundedOrInfeasible, timeLimit].includes(model.getModelStatus())) {
      // The basis of the one before led nowhere: from the beginning.
      model.clearSolver();
      model.run();
    }
    const status = model.getModelStatus();
    if (status === infeasible || status === unboundedOrInfeasible) return null;
    if (status !== optimal) return { ...node, isUnfinished: true };
    this.basis ??= model.getBasis();
    const { colValue, rowValue } = model.getSolution();
    const sums = Array.from(rowValue.subarray(this.firstRow));
    return { ...node, key: this.sign * model.getObjectiveValue(), sums, columns: colValue };
  }

  /**
   * The node with whole numbers; `held` columns keep a value. Ends early when `isEnough` says so of its best key and its
   * bound so far. Answers with both, and with the columns of the best.
   */
  settle(node, { held, gap, isEnough, start }) {
    const { model, highs } = this;
    this.place(node);
    for (const [column, value] of held) model.changeColBounds(column, value, value);
    model.changeColsIntegrality({ kind: 'set', indices: Int32Array.from(this.whole) }, Int32Array.from(this.types));
    model.options.set({ mip_rel_gap: gap });
    if (start) model.setSolution({ colValue: start });
    const key = (value) => (value === undefined || Math.abs(value) > HUGE ? null : this.sign * value);
    model.run({
      [highs.constants.callbackType.mipInterrupt](event) {
        if (isEnough(key(event.data.mip_primal_bound), key(event.data.mip_dual_bound))) event.interrupt();
      },
    });
    const answer = this.answer();
    model.clearIntegrality();
    for (const [column] of held) if (!node.fixed.has(column)) this.free(column);
    if (this.basis) model.setBasis(this.basis);
    return answer;
  }

  answer() {
    const { model, highs, sign } = this;
    const { infeasible, unboundedOrInfeasible } = highs.constants.modelStatus;
    if ([infeasible, unboundedOrInfeasible].includes(model.getModelStatus())) return { bound: -Infinity, best: null };
    const bound = model.info.get('mip_dual_bound');
    const hasAnswer = model.info.get('primal_solution_status') === FEASIBLE;
    return {
      bound: Math.abs(bound) > HUGE ? Infinity : sign * bound,
      best: hasAnswer ? { key: sign * model.getObjectiveValue(), columns: model.getSolution().colValue } : null,
    };
  }
}
