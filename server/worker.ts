import { Logger, run, type Runner, type TaskList } from 'graphile-worker';
import { explainAllocation, replanDay } from './allocation/allocation-service.ts';
import type { Deps } from './deps.ts';
import { log } from './http/log.ts';
import { proveCounters } from './orders/prove-counters.ts';
import { sendMail } from './mail/outbox.ts';
import { inviteAgain, tellCutOffs } from './mail/reminders.ts';
import { takeBalance } from './payments/balance.ts';
import { settleRefund, sweepHolds } from './payments/payment-service.ts';
import type { Jobs } from './queue.ts';
import { runStandingOrders } from './standing-orders/run-standing.ts';
import { serveWaitingList } from './waiting-list/serve-waiting.ts';

/** What the worker does for each kind of job; the tests run the same list. */
export function taskList(deps: Deps): TaskList {
  return {
    'send-mail': (payload) => sendMail(deps, (payload as Jobs['send-mail']).mailId),
    'settle-refund': (payload) => settleRefund(deps, (payload as Jobs['settle-refund']).paymentId),
    'take-balance': (payload) => takeBalance(deps, (payload as Jobs['take-balance']).paymentId),
    'replan-day': (payload) => replanDay(deps, (payload as Jobs['replan-day']).dayId),
    'explain-allocation': (payload) => explainAllocation(deps, (payload as Jobs['explain-allocation']).allocationId),
    'sweep-holds': () => sweepHolds(deps),
    'run-standing-orders': () => runStandingOrders(deps),
    'serve-waiting-list': () => serveWaitingList(deps),
    'tell-cut-offs': () => tellCutOffs(deps),
    'invite-again': () => inviteAgain(deps),
    'prove-counters': async () => void (await proveCounters(deps)),
  };
}

const logger = new Logger(() => (level, message) => {
  if (String(level) === 'error') log.error({ message }, 'worker');
});

/**
 * By the clock of UTC. Each minute the sweep asks the payment company about every hold whose page has run out, and
 * what came free goes to the waiting list; each night what is held and sold of every offer is counted again; each
 * morning customers are reminded and invited.
 */
const CRONTAB = [
  '* * * * * sweep-holds ?fill=2m',
  '* * * * * serve-waiting-list',
  '*/10 * * * * run-standing-orders',
  '30 3 * * * prove-counters',
  '0 9 * * * tell-cut-offs ?fill=8h',
  '15 9 * * * invite-again ?fill=8h',
].join('\n');

export function startWorker(deps: Deps, databaseUrl: string): Promise<Runner> {
  return run({
    connectionString: databaseUrl,
    concurrency: 4,
    noHandleSignals: true,
    logger,
    crontab: CRONTAB,
    taskList: taskList(deps),
  });
}
