/** Four to six round ticks from nought that reach the largest value: steps of 1, 2 or 5 with noughts. */
export function niceTicks(most: number): number[] {
  if (!(most > 0)) return [0, 1];
  const rough = most / 4;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((each) => each * power).find((each) => each >= rough) ?? power * 10;
  return Array.from({ length: Math.ceil(most / step) + 1 }, (_, at) => Math.round(at * step));
}
