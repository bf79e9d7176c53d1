import { sql } from 'drizzle-orm';
import type { Db, Tx } from './deps.ts';

/** Every kind of work that is done after the answer, with what it is told. */
export type Jobs = {
  'send-mail': { mailId: string };
  'settle-refund': { paymentId: string };
  'take-balance': { paymentId: string };
  'replan-day': { dayId: string };
  'explain-allocation': { allocationId: string };
};

/** Enqueues inside the caller's transaction: a rollback takes the job with it. */
export async function enqueue<K extends keyof Jobs>(db: Db | Tx, name: K, payload: Jobs[K]): Promise<void> {
  const body = JSON.stringify(payload);
  await db.execute(sql`select graphile_worker.add_job(${name}, ${body}::json, max_attempts := 12)`);
}
