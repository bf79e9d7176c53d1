import type { MeatState } from './allocation-input.ts';
import { heapKey } from './allocation-model.ts';

/** Whole grams of each cut and state that nothing has taken yet. */
export class Heaps {
  private readonly grams = new Map<string, number>();

  add(cutId: string, state: MeatState, grams: number): void {
    const key = heapKey(cutId, state);
    this.grams.set(key, (this.grams.get(key) ?? 0) + grams);
  }

  get(cutId: string, state: MeatState): number {
    return this.grams.get(heapKey(cutId, state)) ?? 0;
  }

  /** Takes up to `grams` and returns what there was. */
  take(cutId: string, state: MeatState, grams: number): number {
    const taken = Math.max(0, Math.min(grams, this.get(cutId, state)));
    this.add(cutId, state, -taken);
    return taken;
  }
}
