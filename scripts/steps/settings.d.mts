export type Ports = Record<
  'PORT' | 'PAYMENTS_FAKE_PORT' | 'MAIL_FAKE_SMTP_PORT' | 'MAIL_FAKE_HTTP_PORT' | 'PG_PORT',
  number
>;
export const root: string;
export const dataDir: string;
export function readPorts(): Ports;
export function demoEnvironment(options: {
  ports: Ports;
  databaseUrl: string;
  origin?: string;
}): Record<string, string>;
