import { z } from 'zod';

const Env = z.object({
  NODE_ENV: z.enum(['development', 'production', 'test']).default('production'),
  PORT: z.coerce.number().int().min(0).max(65_535).default(8080),
  PUBLIC_ORIGIN: z.url(),
  DATABASE_URL: z.string().min(1),
  BETTER_AUTH_SECRET: z.string().min(32),
  STRIPE_SECRET_KEY: z.string().min(8),
  STRIPE_WEBHOOK_SECRET: z.string().min(8),
  STRIPE_PUBLISHABLE_KEY: z.string().min(8),
  /** Stripe's own, unless a stand-in plays it. */
  STRIPE_JS_URL: z.url().default('https://js.stripe.com/endive/stripe.js'),
  STRIPE_API_HOST: z.string().optional(),
  STRIPE_API_PORT: z.coerce.number().int().optional(),
  STRIPE_API_PROTOCOL: z.enum(['http', 'https']).optional(),
  SMTP_URL: z.url(),
  MAIL_FROM: z.string().min(3),
  MAIL_INBOUND_TOKEN: z.string().min(16),
  COSTLY_POSTS_PER_MINUTE: z.coerce.number().int().min(1).default(30),
});
export type Env = z.infer<typeof Env>;

/** Read once at start. A missing setting ends the process with its name, before anything is opened. */
export function readEnv(): Env {
  const parsed = Env.safeParse(process.env);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
  throw new Error(`Settings are missing or wrong (see .env.example):\n${lines.join('\n')}`);
}

/** The page renderer's loaders read this address: they call the API of the process they run in. */
export function tellPagesTheApi(port: number): void {
  process.env.API_ORIGIN = `http://127.0.0.1:${port}`;
}

/** Quiet under test, where every refusal is asserted by its answer. */
export const logLevel = process.env.VITEST ? 'silent' : (process.env.LOG_LEVEL ?? 'info');
