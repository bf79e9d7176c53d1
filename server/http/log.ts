import pino from 'pino';

/** One line of JSON per event. Bodies, cookies and addresses of people are never logged. */
export const log = pino({
  level: process.env.NODE_ENV === 'test' ? 'silent' : (process.env.LOG_LEVEL ?? 'info'),
  base: null,
  redact: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'],
});
