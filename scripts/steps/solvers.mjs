import { existsSync } from 'node:fs';
import { installPackages } from './debian-packages.mjs';

/** Two solvers of other hands, against which ours is checked: Debian's packages and their programs. */
const solvers = { 'coinor-cbc': '/usr/bin/cbc', 'glpk-utils': '/usr/bin/glpsol' };

export function missingSolvers() {
  return Object.entries(solvers).flatMap(([name, program]) => (existsSync(program) ? [] : [name]));
}

export async function ensureSolvers() {
  const missing = missingSolvers();
  if (missing.length > 0) await installPackages(missing);
}
