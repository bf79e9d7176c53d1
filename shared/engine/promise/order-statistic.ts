/** How sure the bound itself is to hold, given that only so many scenarios were drawn. */
const BOUND_CONFIDENCE = 0.95;

/**
 * Rank, counted from the lowest as 1, of the drawn value that lies below the wanted share of all possible ones with 95 %
 * assurance: the largest k with P(Binomial(n, 1 - confidence) >= k) >= 0.95, the distribution-free lower tolerance bound.
 * 0 when there are too few scenarios for any.
 */
export function rankOfBound(scenarios: number, confidence: number): number {
  const miss = 1 - confidence;
  if (scenarios <= 0 || confidence <= 0) return Math.max(0, scenarios);
  if (miss <= 0) return 0;
  let logTerm = scenarios * Math.log(confidence);
  let below = 0;
  for (let rank = 0; rank <= scenarios; rank += 1) {
    below += Math.exp(logTerm);
    // `below` is P(X <= rank): rank + 1 would need it to be at most 5 %.
    if (below > 1 - BOUND_CONFIDENCE) return rank;
    logTerm += Math.log(((scenarios - rank) / (rank + 1)) * (miss / confidence));
  }
  return scenarios;
}
