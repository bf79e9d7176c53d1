import type { WeighedPack } from '#shared/engine/box-fill/box-fill-types.ts';
import type { Job } from './fill-work.ts';

type Choice = { pack: WeighedPack; job: Job };

/** Packs for what is sold by weight: butchers' cuts first, then loose packs, each in the order in which it was ordered. */
export function choosePacks(jobs: readonly Job[], free: readonly WeighedPack[]): Choice[] {
  const left = new Set(free);
  const chosen: Choice[] = [];
  for (const job of jobs) {
    if (job.kind === 'box') continue;
    const ofCut = [...left]
      .filter((pack) => pack.cutId === job.cutId)
      .sort((a, b) => b.grams - a.grams || (a.id < b.id ? -1 : 1));
    const fresh = ofCut.filter((pack) => pack.state === 'fresh');
    // Butchers reserve fresh beef; a loose pack may be frozen where no fresh one is left.
    const packs =
      job.kind === 'trade'
        ? forWeight(fresh, job.grams - gramsIn(job))
        : forOne(fresh.length > 0 ? fresh : ofCut, job.upperGrams);
    for (const pack of packs) {
      left.delete(pack);
      chosen.push({ pack, job });
    }
  }
  return chosen;
}

function gramsIn(job: Job): number {
  return job.packs.reduce((sum, pack) => sum + pack.grams, 0);
}

/** The heaviest pack that the customer has paid for; failing that the lightest there is, which costs no more. */
function forOne(ofCut: readonly WeighedPack[], upperGrams: number): WeighedPack[] {
  const pack = ofCut.find((candidate) => candidate.grams <= upperGrams) ?? ofCut.at(-1);
  return pack ? [pack] : [];
}

/** Heavy packs first while they fit, then one more if that comes nearer to what was reserved than stopping short. */
function forWeight(ofCut: readonly WeighedPack[], wanted: number): WeighedPack[] {
  const packs: WeighedPack[] = [];
  let missing = wanted;
  for (const pack of ofCut) {
    if (pack.grams > missing) continue;
    packs.push(pack);
    missing -= pack.grams;
  }
  const last = ofCut.filter((pack) => !packs.includes(pack)).at(-1);
  if (last && missing > 0 && last.grams - missing < missing) packs.push(last);
  return packs;
}
