/** Refunds whose own mail says what they are for, weights and trace codes included. */
export const WEIGHTS_SETTLED = 'weights settled';
