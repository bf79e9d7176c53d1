export const PHOTOGRAPH_TYPES = ['image/jpeg', 'image/png', 'image/webp'] as const;
export type PhotographType = (typeof PHOTOGRAPH_TYPES)[number];

/** Largest file that is taken, in bytes, and longest side in pixels: a phone's page needs no more. */
export const PHOTOGRAPH_LIMITS = { bytes: 2_000_000, pixels: 4_000 } as const;
