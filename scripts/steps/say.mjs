/** A reason to stop that a person can act on: shown as one sentence, without a stack. */
export class Refusal extends Error {}

export function say(line = '') {
  process.stdout.write(`${line}\n`);
}

/** Prints what is being done and how long it took; on a terminal the seconds tick. */
export async function step(title, work) {
  const begun = Date.now();
  const seconds = () => ((Date.now() - begun) / 1000).toFixed(1);
  const live = process.stdout.isTTY === true;
  if (live) process.stdout.write(`- ${title} ...`);
  const tick = setInterval(
    () =>
      live ? process.stdout.write(`\r- ${title} ... ${seconds()} s`) : say(`- ${title} ... ${seconds()} s so far`),
    live ? 1_000 : 20_000,
  );
  let outcome = 'failed after';
  try {
    const result = await work();
    outcome = 'done in';
    return result;
  } finally {
    clearInterval(tick);
    say(`${live ? '\r' : ''}- ${title}: ${outcome} ${seconds()} s`);
  }
}
