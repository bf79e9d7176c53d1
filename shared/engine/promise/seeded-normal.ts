/** 32 bits of a text (FNV-1a): the same text gives the same bits on every machine. */
export function hashText(text: string): number {
  let hash = 0x811c9dc5;
  for (let at = 0; at < text.length; at += 1) {
    hash ^= text.charCodeAt(at);
    hash = Math.imul(hash, 0x01000193);
  }
  return hash >>> 0;
}

/** Scrambles 32 bits so that neighbours have nothing in common (the finisher of MurmurHash3). */
function scramble(bits: number): number {
  let mixed = bits;
  mixed = Math.imul(mixed ^ (mixed >>> 16), 0x85ebca6b);
  mixed = Math.imul(mixed ^ (mixed >>> 13), 0xc2b2ae35);
  return (mixed ^ (mixed >>> 16)) >>> 0;
}

/** Between 0 and 1, both left out. */
function uniform(seed: number, scenario: number, stream: number): number {
  const first = scramble(Math.imul(seed, 0x9e3779b1) ^ scramble(stream));
  const second = scramble(first ^ Math.imul(scenario + 1, 0x85ebca77));
  return (scramble(second + stream) + 0.5) / 4_294_967_296;
}

/**
 * A standard normal draw that depends on nothing but the seed, the scenario and what is drawn. A carcase more or less, or
 * another order, leaves every other draw as it was, so that two plans are compared on the same luck.
 */
export function normalOf(seed: number, scenario: number, key: number): number {
  const radius = Math.sqrt(-2 * Math.log(uniform(seed, scenario, key)));
  return radius * Math.cos(2 * Math.PI * uniform(seed, scenario, key ^ 0x5bd1e995));
}
