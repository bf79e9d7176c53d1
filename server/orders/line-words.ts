/** `1 × Hearth and 2 × Rump steak`. */
export function wordsOf(lines: readonly { quantity: number; name: string }[]): string {
  return lines.map((line) => `${line.quantity} × ${line.name}`).join(' and ');
}
