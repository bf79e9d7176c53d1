export function withLock<T>(file: string, work: () => Promise<T>): Promise<T>;
