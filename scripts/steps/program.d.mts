export function onStop(stop: () => unknown): () => void;
export function stopAll(): Promise<void>;
export function sentenceFor(error: unknown): string;
