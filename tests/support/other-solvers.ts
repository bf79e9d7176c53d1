import { execFile } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { promisify } from 'node:util';

const run = promisify(execFile);

export type Answer = { objective: number; seconds: number; isProven: boolean };
/** A model as LP or MPS text. MPS seeks the least, with the sign of what we seek the greatest of turned. */
export type ModelText = { lp: string } | { mps: string };
export type OtherSolver = (model: ModelText, about: { gap: number; seconds: number }) => Promise<Answer>;

async function withModel<Result>(
  model: ModelText,
  act: (file: string, folder: string) => Promise<Result>,
): Promise<Result> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'wholeside-model-'));
  try {
    const [ending, text] = 'lp' in model ? ['lp', model.lp] : ['mps', model.mps];
    const file = path.join(folder, `model.${ending}`);
    await writeFile(file, text);
    return await act(file, folder);
  } finally {
    await rm(folder, { recursive: true });
  }
}

async function start(command: string, args: string[], seconds: number): Promise<string> {
  try {
    const { stdout } = await run(command, args, { timeout: (seconds + 15) * 1000, maxBuffer: 64 * 1024 * 1024 });
    return stdout;
  } catch (error) {
    // Stopped from outside after its time: what it wrote until then proves nothing.
    if ((error as { killed?: boolean }).killed) return '';
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
    throw new Error(`${command} is not installed: apt-get install glpk-utils coinor-cbc`, { cause: error });
  }
}

/** GLPK's stand-alone solver (Debian package glpk-utils). */
export const solveWithGlpk: OtherSolver = (model, { gap, seconds }) =>
  withModel(model, async (file, folder) => {
    const startedAt = performance.now();
    const output = path.join(folder, 'answer.txt');
    const args = [
      'lp' in model ? '--lp' : '--freemps',
      file,
      '--mipgap',
      String(gap),
      '--tmlim',
      String(seconds),
      '--cuts',
      '-o',
      output,
    ];
    const said = await start('glpsol', args, seconds);
    const text = existsSync(output) ? await readFile(output, 'utf8') : '';
    return {
      objective: Math.abs(Number(/Objective:\s+\S+ = (\S+)/.exec(text)?.[1])),
      seconds: (performance.now() - startedAt) / 1000,
      // Stopped by the gap, it calls its answer non-optimal in the file and says why on the way.
      isProven: /Status:\s+(INTEGER )?OPTIMAL/.test(text) || said.includes('GAP TOLERANCE REACHED'),
    };
  });

/** COIN-OR's branch and cut (Debian package coinor-cbc). It minimises what it reads and prints the sign so. */
export const solveWithCbc: OtherSolver = (model, { gap, seconds }) =>
  withModel(model, async (file) => {
    const startedAt = performance.now();
    const args = [file, 'timeMode', 'elapsed', 'ratio', String(gap), 'sec', String(seconds), 'solve'];
    const text = await start('cbc', args, seconds);
    return {
      objective: Math.abs(Number(/Objective value:\s+(\S+)/.exec(text)?.[1])),
      seconds: (performance.now() - startedAt) / 1000,
      isProven: /Result - Optimal solution found/.test(text),
    };
  });
