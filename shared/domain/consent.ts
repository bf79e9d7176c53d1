/** Where somebody said yes or no to marketing mail. */
export const CONSENT_SOURCES = ['checkout', 'account', 'unsubscribe link'] as const;
export type ConsentSource = (typeof CONSENT_SOURCES)[number];

/** The words beside the box to tick, by edition. An edition that anybody agreed to is never changed: add the next one. */
const CONSENT_WORDINGS: Record<number, string> = {
  1: 'Write to me when it may be time to order again, and when new beef is coming.',
};

/** The edition that is shown now. */
export const CONSENT_VERSION = 1;

export function consentWords(version: number): string {
  return CONSENT_WORDINGS[version] ?? '';
}
