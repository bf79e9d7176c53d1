export function freePort(): Promise<number>;
export function requireFreePorts(ports: Record<string, number>): Promise<void>;
