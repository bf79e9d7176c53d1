import { isWhole, SumModel } from './sum-model.mjs';

/** Every so many nodes one is followed down to whole sums, for a better answer. */
const PLUNGE_EVERY = 10;
/** Nodes after which the rest is left to the solver's own search: with an answer to begin from, and without one. */
const MOST_NODES = 2_000;
const MOST_NODES_BLIND = 300;
/** With so many whole numbers an answer near the relaxed one is mostly near enough. */
const MANY_WHOLE = 5_000;
/** A rounding that loses more than this part of the gap has its other side looked at. */
const DEAR_ROUNDING = 1 / 8;
const LEAST_SCORE = 1e-3;

function newCosts() {
  return { down: 0, downs: 0, up: 0, ups: 0 };
}

/**
 * Branch and bound on sums of columns first. Where the columns are many and nearly alike (this side cut one way, or that
 * one), deciding one of them changes nothing; deciding how many of them does. Each node is a linear program, warm from
 * the one before; once all sums are whole, a small whole-number model says which columns make them. Columns that have
 * been seen to matter are branched on too. It ends when no node is above the best answer by more than the gap: the
 * greatest relaxed optimum that is left is the proof.
 */
class Search {
  constructor(nodes, about) {
    this.nodes = nodes;
    this.about = about;
    this.sumCosts = about.sums.map(newCosts);
    this.columnCosts = new Map();
    this.seen = { sum: 0, count: 0 };
    this.best = null;
    this.closed = -Infinity;
    this.open = [];
    /** Key of the node at work, which is not among the open ones. */
    this.working = -Infinity;
    this.count = 0;
    this.tried = new Set();
    this.isStopped = false;
  }

  /** What a bound may be at most for this answer to be proven. */
  reach(key) {
    return key + this.about.gap * Math.max(1, Math.abs(key));
  }

  isOpen(key) {
    return !this.best || key > this.reach(this.best.key);
  }

  bound() {
    const top = this.open.reduce((most, { key }) => Math.max(most, key), -Infinity);
    return Math.max(top, this.working, this.closed, this.best?.key ?? -Infinity);
  }

  relax(node) {
    if (this.about.isOver(this.count)) this.isStopped = true;
    if (this.isStopped) return { ...node, isUnfinished: true };
    const relaxed = this.nodes.relax(node);
    if (relaxed?.isUnfinished) this.isStopped = true;
    return relaxed;
  }

  /** Seeks whole columns within a node; what `isClosing` finds no better than the best needs no proof of its own. */
  settle(node, { held, isClosing = false, start }) {
    const { gap } = this.about;
    const least = this.best?.key ?? -Infinity;
    const floor = isClosing && this.best ? this.reach(least) : least;
    const top = this.bound();
    const isEnough = (key, bound) => {
      this.about.report({ nodes: this.count, best: Math.max(least, key ?? -Infinity), bound: top });
      return (bound !== null && bound <= floor) || (key !== null && this.reach(key) >= top);
    };
    const { best, bound } = this.nodes.settle(node, { held, gap: gap / 4, isEnough, start });
    if (best && best.key > least) this.best = best;
    return bound;
  }

  held({ columns }) {
    return this.nodes.whole.flatMap((column) =>
      isWhole(columns[column]) ? [[column, Math.round(columns[column])]] : [],
    );
  }

  broken({ sums }) {
    return sums.flatMap((value, index) => (isWhole(value) ? [] : [index]));
  }

  wholeSums(node) {
    return { ...node, limits: node.sums.map((value) => [Math.round(value), Math.round(value)]) };
  }

  /** An answer from a node of whole sums: columns that are whole already stay, the others are sought. */
  complete(node) {
    const name = node.sums.map((value) => Math.round(value)).join(' ');
    if (this.tried.has(name)) return;
    this.tried.add(name);
    this.settle(this.wholeSums(node), { held: this.held(node) });
  }

  /** Rounds sum after sum, the nearest first; where that is dear, the other side is looked at too. Of equals, one is first. */
  dive(root, { isLastFirst }) {
    const { gap } = this.about;
    let node = root;
    for (let broken = this.broken(node); broken.length > 0; broken = this.broken(node)) {
      const distance = (index) => Math.abs(node.sums[index] - Math.round(node.sums[index]));
      const order = isLastFirst ? broken.reverse() : broken;
      const index = order.reduce((nearest, each) => (distance(each) < distance(nearest) ? each : nearest));
      const value = node.sums[index];
      const at = (whole) => this.relax({ ...node, limits: node.limits.with(index, [whole, whole]) });
      let next = at(Math.round(value));
      if (!next || node.key - next.key > gap * DEAR_ROUNDING * Math.abs(node.key)) {
        const other = at(Math.round(value) > value ? Math.floor(value) : Math.ceil(value));
        if (!next || (other && other.key > next.key)) next = other;
      }
      if (!next || next.isUnfinished || !this.isOpen(next.key)) return;
      node = next;
    }
    this.complete(node);
  }

  score(costs, value, usual) {
    const part = value - Math.floor(value);
    const down = (costs?.downs ? costs.down / costs.downs : usual) * part;
    const up = (costs?.ups ? costs.up / costs.ups : usual) * (1 - part);
    return Math.max(down, LEAST_SCORE) * Math.max(up, LEAST_SCORE);
  }

  /** The broken sum or column whose rounding is expected to cost most on both sides. Null when all choices are whole. */
  pick(node) {
    const usual = this.seen.count > 0 ? this.seen.sum / this.seen.count : 1;
    const sums = this.broken(node).map((index) => {
      const costs = this.sumCosts[index];
      return { index, costs, value: node.sums[index], score: this.score(costs, node.sums[index], usual) };
    });
    const columns = this.nodes.choices.flatMap((column) => {
      const value = node.columns[column];
      const costs = this.columnCosts.get(column);
      if (isWhole(value) || (!costs && sums.length > 0)) return [];
      return [{ column, costs: costs ?? newCosts(), value, score: this.score(costs, value, usual) }];
    });
    return [...sums, ...columns].reduce((top, each) => (!top || each.score > top.score ? each : top), null);
  }

  /** The two halves of a node that are worth a look; null when only whole numbers beyond choices are left. */
  branch(node) {
    const picked = this.pick(node);
    if (!picked) return null;
    this.count += 1;
    const { index, column, costs, value } = picked;
    if (column !== undefined) this.columnCosts.set(column, costs);
    const floor = Math.floor(value);
    return ['down', 'up'].flatMap((side) => {
      const isDown = side === 'down';
      const [lower, upper] = index === undefined ? [] : node.limits[index];
      const half =
        index === undefined
          ? { ...node, fixed: new Map(node.fixed).set(column, isDown ? floor : floor + 1) }
          : { ...node, limits: node.limits.with(index, isDown ? [lower, floor] : [floor + 1, upper]) };
      const next = this.relax(half);
      if (!next) return [];
      // Without time to look, a half is as good as the whole.
      if (next.isUnfinished) return [{ ...node, isUnfinished: true }];
      const each = (node.key - next.key) / (isDown ? value - floor : floor + 1 - value);
      costs[side] += each;
      costs[`${side}s`] += 1;
      this.seen.sum += each;
      this.seen.count += 1;
      return this.isOpen(next.key) ? [next] : [];
    });
  }

  /** From a node always into its better half, until all sums are whole. What is passed by stays open. */
  plunge(from) {
    let node = from;
    while (!this.isStopped && this.broken(node).length > 0) {
      const halves = this.branch(node).sort((a, b) => a.key - b.key);
      const better = halves.pop();
      this.open.push(...halves);
      if (!better) return;
      node = better;
    }
    if (!this.isStopped) this.complete(node);
    this.open.push(node);
  }

  /** What branching cannot part any further is left to the solver's own search, with nothing held. */
  close(node) {
    const bound = this.settle(node, { held: [], isClosing: true, start: this.best?.columns });
    this.closed = Math.max(this.closed, Math.min(node.key, bound));
  }

  visit(node, turn) {
    const isBroken = this.broken(node).length > 0;
    if (isBroken && turn % PLUNGE_EVERY === 0) return this.plunge(node);
    if (!isBroken) this.complete(node);
    if (!this.isOpen(node.key)) return undefined;
    const halves = this.branch(node);
    if (halves) this.open.push(...halves);
    else this.close(node);
    return undefined;
  }

  begin(root) {
    const { start } = this.about;
    this.open = [root];
    if (start) this.settle(root, { held: this.nodes.whole.map((column) => [column, Math.round(start[column])]) });
    if (this.nodes.whole.length > MANY_WHOLE) this.settle(root, { held: this.held(root) });
    for (const isLastFirst of [true, false]) {
      if (!this.isOpen(root.key)) return;
      this.dive(root, { isLastFirst });
    }
    if (!this.isOpen(root.key)) return;
    this.open = [];
    this.working = root.key;
    this.plunge(root);
    if (!this.isStopped) this.working = -Infinity;
  }

  run() {
    const root = this.relax(this.nodes.root());
    if (!root || root.isUnfinished) return;
    this.begin(root);
    for (let turn = 1; this.open.length > 0 && !this.isStopped; turn += 1) {
      this.open.sort((a, b) => a.key - b.key);
      const node = this.open.pop();
      if (!this.isOpen(node.key)) {
        this.open = [node];
        return;
      }
      if (this.count > (this.best ? MOST_NODES : MOST_NODES_BLIND)) {
        this.open = [];
        this.working = node.key;
        this.close({ ...this.nodes.root(), key: node.key });
        this.working = -Infinity;
        return;
      }
      this.working = node.key;
      this.visit(node, turn);
      if (!this.isStopped) this.working = -Infinity;
      this.about.report({ nodes: this.count, best: this.best?.key ?? -Infinity, bound: this.bound() });
    }
  }
}

/**
 * Solves a model by branching on `sums` (lists of column indices). `sign` is 1 when the greatest objective is sought and
 * -1 for the least; `isOver(nodes)` ends it with the best so far. Keys are objectives times the sign.
 */
export function searchSums(highs, model, about) {
  const search = new Search(new SumModel(highs, model, about), about);
  search.run();
  return { best: search.best, bound: search.bound(), nodes: search.count, isStopped: search.isStopped };
}
