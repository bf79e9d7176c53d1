import type { Tissue } from './specification.ts';

/** The order in which tissues are read; apart from the schemas, so that a screen may have it without them. */
export const TISSUES = ['meat', 'fat', 'bone', 'loss'] as const satisfies readonly Tissue[];
