export function stopAll(): Promise<void>;
