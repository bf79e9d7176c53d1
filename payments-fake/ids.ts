import { randomInt } from 'node:crypto';

const letters = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789';

export function randomText(length: number): string {
  return Array.from({ length }, () => letters.charAt(randomInt(letters.length))).join('');
}

export function newId(prefix: string): string {
  return `${prefix}_${randomText(24)}`;
}
