import { parentPort } from 'node:worker_threads';
import loadHighs from 'highs';
import { solveModel, solveVariations } from './solve-model.mjs';

/** The first solve of a thread is several times slower while the machine code is made: this one pays for it. */
const WARM_UP = 'Maximize\n value: 3 a + 2 b\nSubject To\n room: 2 a + b <= 7\n a + 3 b <= 9\nGeneral\n a\n b\nEnd\n';

const highs = await loadHighs();
solveModel(highs, { lpText: WARM_UP, options: {} });

parentPort.on('message', (task) => {
  const report = task.hasProgress ? (progress) => parentPort.postMessage({ kind: 'progress', progress }) : undefined;
  try {
    const answer = task.variations ? solveVariations(highs, task) : solveModel(highs, task, report);
    parentPort.postMessage({ kind: 'answer', answer });
  } catch (error) {
    parentPort.postMessage({ kind: 'failure', message: error instanceof Error ? error.message : String(error) });
  }
});
parentPort.postMessage({ kind: 'ready' });
