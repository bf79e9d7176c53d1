import { Refusal, say } from './say.mjs';

const stops = [];
let stopping;

/** Registers what must be stopped at the end, last one first. Returns a function that withdraws it. */
export function onStop(stop) {
  stops.push(stop);
  return () => {
    const at = stops.indexOf(stop);
    if (at >= 0) stops.splice(at, 1);
  };
}

/** Stops whatever was registered, last one first. */
export async function stopAll() {
  for (let stop = stops.pop(); stop; stop = stops.pop()) {
    try {
      await stop();
    } catch (error) {
      say(`While stopping: ${error.message}`);
    }
  }
}

/** True from the moment that the end has begun: what fails then fails because it was stopped. */
export const isStopping = () => stopping !== undefined;

export function sentenceFor(error) {
  if (error instanceof Refusal) return error.message;
  if (error?.code === 'EACCES' || error?.code === 'EPERM') {
    return `This user may not use ${error.path ?? 'a file that is needed'} (${error.code}): it belongs to another user. Run as that user, or let that user remove it.`;
  }
  if (error?.code === 'ENOSPC') return 'The disk is full.';
  return error?.stack ?? String(error);
}

/**
 * Runs a script's main and stops whatever it registered, whether it ends, is refused or is interrupted.
 * `signalCode` is the exit code after Ctrl-C.
 */
export async function program(main, { signalCode = 130 } = {}) {
  const end = async (code) => {
    stopping ??= stopAll();
    await stopping;
    process.exit(code);
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    process.on(signal, () => {
      if (!isStopping()) say('\nStopping ...');
      void end(signalCode);
    });
  }
  try {
    await end((await main()) ?? 0);
  } catch (error) {
    if (isStopping()) return;
    say(sentenceFor(error));
    await end(1);
  }
}
