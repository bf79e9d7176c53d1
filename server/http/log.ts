import pino from 'pino';
import { logLevel } from '#server/env.ts';

/** One line of JSON per event. Bodies, cookies and addresses of people are never logged. */
export const log = pino({
  level: logLevel,
  base: null,
  redact: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'],
});
