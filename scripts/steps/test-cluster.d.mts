export function startTestCluster(): Promise<{ url: (database: string) => string }>;
